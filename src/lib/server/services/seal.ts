import { createHash } from 'node:crypto';
import { sealOf, type SealedContent } from '~/lib/profile/seal';

const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** The content of a version with its seal: hex SHA-256 over its canonical JSON. */
export const sealed = ({ profile, kilnId, load }: SealedContent): SealedContent & { sha256: string } => ({
  profile,
  kilnId,
  load,
  sha256: sealOf({ profile, kilnId, load }, sha256),
});
