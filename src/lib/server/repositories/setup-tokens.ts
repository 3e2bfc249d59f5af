import type { Tx } from '../database';
import { SetupTokenModel } from '../models/setup-token';

/** The token with that hash, its row locked until the transaction ends; null where there is none. */
export async function lockSetupToken(
  tx: Tx,
  tokenHash: string,
): Promise<{ expiresAt: Date; usedAt: Date | null } | null> {
  const row = await SetupTokenModel.findByPk(tokenHash, { transaction: tx, lock: tx.LOCK.UPDATE });
  return row && { expiresAt: row.expiresAt, usedAt: row.usedAt };
}

export async function markSetupTokenUsed(tx: Tx, tokenHash: string, usedAt: Date): Promise<void> {
  await SetupTokenModel.update({ usedAt }, { where: { tokenHash }, transaction: tx });
}
