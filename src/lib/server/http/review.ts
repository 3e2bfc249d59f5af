import type { Run } from '~/lib/contracts/runs';
import type { Actor } from '../auth/actor';
import { HoldfastError } from '../errors';
import { listFindings } from '../services/findings';
import { getLog } from '../services/logs';
import { getReview } from '../services/reviews';
import { getSeries } from '../services/series';

/** Points that a strip can show; the island asks for more as it zooms. */
const POINTS = 1500;

/** What the review of a run is drawn from; null while there is no log, or none that could be reviewed. */
export async function reviewOf(actor: Actor, run: Run) {
  const current = run.logs.find((log) => log.current);
  if (!current) return null;
  try {
    const [review, findings, series, log] = await Promise.all([
      getReview(actor, run.id),
      listFindings(actor, run.id, { limit: 200 }),
      getSeries(actor, run.id, { points: POINTS }),
      getLog(actor, run.id, current.id),
    ]);
    return { review, findings: findings.items, series, logRevision: log.revision };
  } catch (error) {
    if (error instanceof HoldfastError && error.code === 'not-found') return null;
    throw error;
  }
}
