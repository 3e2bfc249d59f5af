import { penOf, type StripLayer } from './layers';

/** The pen of a curve in small, as it is drawn on the strip; `hatched` for an area. */
export function PenMark({ pen }: { readonly pen: Pick<StripLayer, 'kind' | 'dash'> | 'hatched' }) {
  if (pen === 'hatched')
    return (
      <svg width="18" height="12" aria-hidden="true" className="pen-mark">
        <path d="M1 11l6 -10m-1 10l6 -10m-1 10l6 -10" />
      </svg>
    );
  const { widthPx, dash } = penOf(pen);
  return (
    <svg width="18" height="12" aria-hidden="true" className="pen-mark">
      <path
        d="M0 6h18"
        strokeWidth={widthPx}
        strokeDasharray={dash.length > 0 ? dash.join(' ') : undefined}
      />
    </svg>
  );
}
