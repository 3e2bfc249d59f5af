import { connect, createServer } from 'node:net';
import { fingerprint } from './root.mjs';

/**
 * A lock that ends with its holder, however it dies: a socket in Linux's abstract namespace, which has no file.
 * Resolves to `{ release, tell }`, or to null with somebody else holding it. `tell(text)` is what `askHolder` hears.
 */
export function tryLock(name) {
  let told = '';
  const server = createServer((socket) => {
    socket.on('error', () => socket.destroy());
    socket.end(told);
  });
  return new Promise((resolve, reject) => {
    server.once('error', (error) => (error.code === 'EADDRINUSE' ? resolve(null) : reject(error)));
    server.listen(addressOf(name), () => {
      server.unref();
      resolve({
        tell: (text) => {
          told = text;
        },
        release: () => new Promise((done) => server.close(done)),
      });
    });
  });
}

/** What the holder of a lock says of itself; empty where nobody holds it or it has nothing to say yet. */
export function askHolder(name) {
  return new Promise((resolve) => {
    let heard = '';
    const socket = connect(addressOf(name));
    socket.setTimeout(2000, () => socket.destroy());
    socket.on('data', (data) => (heard += data));
    socket.on('error', () => undefined);
    socket.on('close', () => resolve(heard));
  });
}

/** Waits for a lock, asking four times a second. */
export async function waitForLock(name, seconds, onWait = () => undefined) {
  for (let tries = 0; tries < seconds * 4; tries++) {
    const lock = await tryLock(name);
    if (lock) return lock;
    if (tries === 0) onWait();
    await new Promise((done) => setTimeout(done, 250));
  }
  return null;
}

const addressOf = (name) => `\0holdfast-${fingerprint(name)}`;
