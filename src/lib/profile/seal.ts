import { canonicalJson } from './canonical';
import type { Profile } from './schema';
import type { Load } from '../thermal/load-schema';

/** What an approved version is sealed over: all of it that says how to fire, nothing that says who or when. */
export interface SealedContent {
  profile: Profile;
  kilnId: string | null;
  load: Load | null;
}

/** The canonical text (RFC 8785) that a version's seal is the SHA-256 of, taken over its UTF-8 bytes. */
export const sealText = ({ profile, kilnId, load }: SealedContent): string =>
  canonicalJson({ kilnId, load, profile });

/**
 * Seal of a version.
 *
 * @param digest SHA-256 of the UTF-8 bytes of a text, in lower-case hex
 */
export const sealOf = (content: SealedContent, digest: (text: string) => string): string =>
  digest(sealText(content));
