import { chmodSync, existsSync, mkdirSync, statSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { capture } from './command.mjs';
import { fingerprint, ROOT } from './root.mjs';
import { say, Stop } from './say.mjs';

/** The folder that holds keys and, where it can, the database: HOLDFAST_DATA, or `.data` in the project. */
export function dataFolder() {
  const folder = resolve(ROOT, process.env.HOLDFAST_DATA || '.data');
  try {
    mkdirSync(folder, { recursive: true });
  } catch (error) {
    throw new Stop(
      `The folder ${folder} cannot be made (${error.code}). Set HOLDFAST_DATA to a folder of your own.`,
    );
  }
  return folder;
}

/**
 * Where the database lives and who runs it: `{ folder, uid, gid }`. PostgreSQL refuses to run as root, so as root it is
 * the owner of the database that is there already, or Debian's postgres user; as anyone else it is that person.
 */
export function placeOfCluster(data) {
  const near = join(data, 'database');
  const far = ['/var/lib/postgresql', '/var/tmp'].map((parent) =>
    join(parent, `holdfast-${fingerprint(data)}`),
  );
  const existing = [near, ...far].find((folder) => existsSync(folder));
  if (process.getuid() !== 0) return { folder: ownFolder(existing ?? near), ...ownUser() };
  const owner = existing ? statSync(existing) : null;
  if (owner && owner.uid !== 0) return { folder: existing, uid: owner.uid, gid: owner.gid };
  const user = postgresUser();
  const folder = [near, ...far].find((place) => madeFor(user, place));
  if (!folder)
    throw new Stop(`The user postgres can write neither in ${near} nor in ${far.join(' nor in ')}.`);
  if (folder !== near) say(`The user postgres cannot reach ${data}, so the database is kept in ${folder}.`);
  return { folder, ...user };
}

function ownFolder(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const owner = statSync(folder).uid;
  if (owner !== process.getuid())
    throw new Stop(
      `The database in ${folder} belongs to another user (uid ${owner}). Start as that user or as root, ` +
        'or set HOLDFAST_DATA to a folder of your own.',
    );
  return folder;
}

function ownUser() {
  const uid = process.getuid();
  if (capture('getent', ['passwd', String(uid)]).code !== 0)
    throw new Stop(
      `The user with uid ${uid} has no entry in /etc/passwd, and PostgreSQL does not start without one. ` +
        'Start as a user that has one, or set DATABASE_URL to a PostgreSQL server that runs already.',
    );
  return { uid, gid: process.getgid() };
}

function postgresUser() {
  const entry = capture('getent', ['passwd', 'postgres']);
  if (entry.code !== 0)
    throw new Stop(
      "There is no user 'postgres' to run the database as. Debian's package postgresql-common makes it.",
    );
  const [, , uid, gid] = entry.out.trim().split(':');
  return { uid: Number(uid), gid: Number(gid) };
}

/** Makes the folder, private to that user, and says whether the user can really work there. */
function madeFor(user, folder) {
  if (!existsSync(dirname(folder))) return false;
  try {
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    chmodSync(folder, 0o700);
  } catch {
    return false;
  }
  capture('chown', [`${user.uid}:${user.gid}`, folder]);
  const probe = capture('setpriv', [...asUser(user), '--', 'test', '-w', folder], { cwd: '/' });
  if (probe.code !== 0) capture('rmdir', [folder]);
  return probe.code === 0;
}

/** Options of `setpriv` that make the command run as that user: none where this process is that user already. */
export const asUser = (user) =>
  process.getuid() === 0 ? [`--reuid=${user.uid}`, `--regid=${user.gid}`, '--clear-groups'] : [];
