import { PenMark } from '../strip/PenMark';
import { LAYERS, type LayerId } from './layers-shown';

interface LayerSwitchesProps {
  readonly shown: ReadonlySet<LayerId>;
  readonly available: ReadonlySet<LayerId>;
  readonly onToggle: (id: LayerId) => void;
}

type Drawn = (typeof LAYERS)[number]['drawn'];

/** Asides differ by their dashes, curves by their kind. */
function penOfSwitch(drawn: Drawn) {
  if (drawn.as === 'hatch') return 'hatched';
  return drawn.as === 'aside' ? { kind: 'aside' as const, dash: drawn.dash } : { kind: drawn.kind };
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
          <PenMark pen={penOfSwitch(layer.drawn)} />
          {layer.name}
        </button>
      ))}
    </div>
  );
}
