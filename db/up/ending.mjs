import { readFileSync } from 'node:fs';
import { endRunning } from './command.mjs';
import { say } from './say.mjs';

/**
 * Ends everything in order at Ctrl-C, at a signal, or when npm is gone. A second Ctrl-C does not wait. What is killed
 * outright is ended by the kernel, or found by the next start.
 */
export function endOnSignals() {
  const steps = [];
  let ending = false;
  const end = async (code, line) => {
    if (ending) process.exit(1);
    ending = true;
    if (line) say(line);
    endRunning();
    for (const step of steps.reverse()) await Promise.resolve(step()).catch(() => undefined);
    process.exit(code);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void end(0, '\nStopping.'));
  watchNpm(end);
  return { before: (step) => steps.push(step), end };
}

/** npm passes on Ctrl-C, but nothing when it is itself killed outright; between it and this process stands a shell. */
function watchNpm(end) {
  if (!process.env.npm_lifecycle_event) return;
  const ancestry = () => `${process.ppid} ${parentOf(process.ppid)}`;
  const before = ancestry();
  setInterval(() => {
    if (ancestry() !== before) void end(0, 'npm is gone; stopping.');
  }, 1000).unref();
}

function parentOf(pid) {
  try {
    // The name in brackets may hold spaces; the parent is the second field after it.
    return readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ').at(-1).split(' ')[1];
  } catch {
    return '';
  }
}
