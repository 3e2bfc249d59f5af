import type { Tx } from '../database';
import { AuditEventModel } from '../models/audit-event';

/** Adds one line to the studio's trail: who did what to which thing. Ids only, no names and no addresses. */
export async function recordEvent(
  tx: Tx,
  who: { readonly studioId: string; readonly actorId: string | null },
  what: string,
  subjectKind: string,
  subjectId: string | null,
  detail: Record<string, unknown> = {},
): Promise<void> {
  const { studioId, actorId } = who;
  await AuditEventModel.create(
    { studioId, actorId, what, subjectKind, subjectId, detail },
    { transaction: tx, returning: false },
  );
}
