import { spawn, spawnSync } from 'node:child_process';

/** Runs a command to its end and gives `{ code, out }`, both streams in one text. A command that is not there has code 127. */
export function capture(command, args, options = {}) {
  const result = spawnSync(command, args, { encoding: 'utf8', maxBuffer: 64 * 1024 * 1024, ...options });
  if (result.error) return { code: 127, out: String(result.error.message) };
  return { code: result.status ?? 1, out: `${result.stdout ?? ''}${result.stderr ?? ''}` };
}

const running = new Set();

/** Runs a command on this terminal; resolves to its exit code. The kernel ends it with this process, however that ends. */
export function show(command, args, options = {}) {
  return new Promise((resolve) => {
    const tied = ['--pdeathsig', 'TERM', '--', command, ...args];
    const child = spawn('setpriv', tied, { stdio: 'inherit', ...options });
    running.add(child);
    const done = (code) => {
      running.delete(child);
      resolve(code);
    };
    child.once('error', () => done(127));
    child.once('exit', (code, signal) => done(code ?? (signal ? 1 : 0)));
  });
}

/** Ends what `show` still runs. */
export function endRunning() {
  for (const child of running) child.kill('SIGTERM');
}
