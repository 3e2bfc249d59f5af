import { createHash } from 'node:crypto';
import { realpathSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** The project's own folder. */
export const ROOT = realpathSync(fileURLToPath(new URL('../..', import.meta.url)));

/** Short, stable and safe in a file name: stands for a path where its letters cannot. */
export const fingerprint = (text) => createHash('sha256').update(text).digest('hex').slice(0, 16);
