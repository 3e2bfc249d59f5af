import { spawn, type ChildProcess } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { ROOT } from '../../db/up/root.mjs';

export interface WholeStart {
  readonly url: string;
  readonly child: ChildProcess;
  /** What it printed. */
  readonly said: () => string;
}

/** `npm start` as a person runs it, on a data folder of its own and any free port; resolves when it serves. */
export async function wholeStart(data: string): Promise<WholeStart> {
  const env = { ...process.env, HOLDFAST_DATA: data, HOLDFAST_MODE: 'demo', PORT: '0' };
  for (const name of ['DATABASE_URL', 'DATABASE_APP_URL', 'HOLDFAST_SECRET', 'npm_lifecycle_event'])
    Reflect.deleteProperty(env, name);
  const child = spawn(process.execPath, [join(ROOT, 'db/up/start.mjs')], { env, cwd: ROOT });
  let said = '';
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (data: Buffer) => (said += String(data)));
  while (!said.includes('Ctrl-C stops it.')) {
    if (child.exitCode !== null) throw new Error(`the start ended with ${child.exitCode}:\n${said}`);
    await sleep(50);
  }
  const url = /Holdfast is at (\S+)/.exec(said)?.[1] ?? '';
  return { url, child, said: () => said };
}

/** The database server of a data folder: its process, or null. */
export function serverPid(data: string): number | null {
  try {
    return Number(readFileSync(join(data, 'database/pg/postmaster.pid'), 'utf8').split('\n')[0]);
  } catch {
    return null;
  }
}

const parentOf = (pid: string): number => {
  try {
    return Number(readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ').at(-1)?.split(' ')[1]);
  } catch {
    return 0;
  }
};

/** A process and all that it started, those that are there now. */
export function familyOf(pid: number): number[] {
  const children = readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && parentOf(name) === pid)
    .map(Number);
  return [pid, ...children.flatMap(familyOf)];
}

export const isAlive = (pid: number): boolean => {
  try {
    return !/\) Z /.test(readFileSync(`/proc/${pid}/stat`, 'utf8'));
  } catch {
    return false;
  }
};
