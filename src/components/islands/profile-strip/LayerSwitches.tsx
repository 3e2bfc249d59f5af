import { LAYERS, type LayerId } from './layers-shown';

const MARKS: Readonly<Record<(typeof LAYERS)[number]['mark'], string>> = {
  solid: 'M1 6h16',
  dashed: 'M1 6h6m3 0h6',
  dotted: 'M1 6h2m2.500 0h2m2.500 0h2m2.500 0h2',
  hatched: 'M1 11l6 -10m-1 10l6 -10m-1 10l6 -10',
  'aside-1': 'M1 6h8m2 0h2m2 0h2',
  'aside-2': 'M1 6h4m2 0h4m2 0h4',
  'aside-3': 'M1 9h5v-6h5v4h6',
  'aside-4': 'M1 11c8 0 12 -2 16 -10',
};

interface LayerSwitchesProps {
  readonly shown: ReadonlySet<LayerId>;
  readonly available: ReadonlySet<LayerId>;
  readonly onToggle: (id: LayerId) => void;
}

/** Which curves lie on the strip. What the load gives nothing to show for is left out. */
export function LayerSwitches({ shown, available, onToggle }: LayerSwitchesProps) {
  return (
    <div className="layer-switches" role="group" aria-label="Curves on the strip">
      {LAYERS.filter((layer) => available.has(layer.id)).map((layer) => (
        <button
          key={layer.id}
          type="button"
          className="chip"
          aria-pressed={shown.has(layer.id)}
          onClick={() => onToggle(layer.id)}
        >
          <svg width="18" height="12" aria-hidden="true" className="layer-mark" data-mark={layer.mark}>
            <path d={MARKS[layer.mark]} />
          </svg>
          {layer.name}
        </button>
      ))}
    </div>
  );
}
