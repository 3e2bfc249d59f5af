import { randomBytes } from 'node:crypto';
import {
  chmodSync,
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  readFileSync,
  renameSync,
  writeSync,
} from 'node:fs';
import { join } from 'node:path';

/** A random key kept in the data folder, readable by its owner only; made at first use and then always the same. */
export function keptKey(data, name) {
  const folder = join(data, 'keys');
  const file = join(folder, name);
  if (existsSync(file)) return readFileSync(file, 'utf8').trim();
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  chmodSync(folder, 0o700);
  const key = randomBytes(32).toString('base64url');
  const draft = `${file}.${process.pid}`;
  const handle = openSync(draft, 'wx', 0o600);
  writeSync(handle, `${key}\n`);
  fsyncSync(handle);
  closeSync(handle);
  renameSync(draft, file);
  return key;
}
