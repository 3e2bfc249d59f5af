import { useEffect, useMemo, useState } from 'react';
import { flushSync } from 'react-dom';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import type { ProfileDocument } from './document';

export type EstimateOf = (document: ProfileDocument) => Estimate | null;

export interface Estimated {
  readonly document: ProfileDocument;
  readonly estimate: Estimate | null;
}

/** The same model, each document computed once. */
function remembering(estimateOf: EstimateOf): EstimateOf {
  const byDocument = new WeakMap<ProfileDocument, { readonly estimate: Estimate | null }>();
  return (document) => {
    const found = byDocument.get(document);
    if (found) return found.estimate;
    const estimate = estimateOf(document);
    byDocument.set(document, { estimate });
    return estimate;
  };
}

/**
 * Estimates of documents as they are edited, within the frame of the edit: the work is asked for before the frame is
 * painted and its answer is drawn in it. Each document is computed once; going back to one by undo costs nothing.
 *
 * @param estimateOf the model with its surroundings; another function empties what is remembered
 */
export function useEstimates(
  document: ProfileDocument,
  before: ProfileDocument | null,
  estimateOf: EstimateOf,
) {
  const known = useMemo(() => remembering(estimateOf), [estimateOf]);
  const [now, setNow] = useState<Estimated | null>(null);
  const [was, setWas] = useState<Estimated | null>(null);

  useEffect(() => {
    const frame = requestAnimationFrame(() => {
      const estimate = known(document);
      const earlier = before === null ? null : { document: before, estimate: known(before) };
      flushSync(() => {
        setNow({ document, estimate });
        setWas(earlier);
      });
    });
    return () => cancelAnimationFrame(frame);
  }, [document, before, known]);

  return { now, was };
}
