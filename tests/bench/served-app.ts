import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { request } from 'node:http';
import { join } from 'node:path';
import { needBuild } from '../../db/up/build.mjs';
import { ROOT } from '../../db/up/root.mjs';
import { demoAccounts } from '../../db/seeds/people';

/** The built application in a process of its own on the benchmark's database, with a technician signed in. */
export interface ServedApp {
  readonly pid: number;
  call<T>(method: string, path: string, body?: object): Promise<T>;
  /** Sends a file in pieces as they are made, and gives the answer's status and body. */
  upload(path: string, pieces: Iterable<Uint8Array>): Promise<{ status: number; body: string }>;
  stop(): Promise<void>;
}

export async function servedApp(): Promise<ServedApp> {
  const child = spawn(process.execPath, ['--expose-gc', join(ROOT, 'db/up/serve.mjs'), await needBuild()], {
    env: { ...process.env, NODE_ENV: 'production', PORT: '0', HOST: '127.0.0.1' },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  });
  const [{ port }] = (await once(child, 'message')) as [{ port: number }];
  const origin = `http://127.0.0.1:${port}`;
  const headers: Record<string, string> = { Origin: origin };
  const call = async <T>(method: string, path: string, body?: object): Promise<T> => {
    const answer = await fetch(origin + path, {
      method,
      headers: body ? { ...headers, 'Content-Type': 'application/json' } : headers,
      ...(body && { body: JSON.stringify(body) }),
    });
    const cookie = answer.headers.get('set-cookie');
    if (cookie) headers.Cookie = cookie.split(';')[0] ?? '';
    if (!answer.ok) throw new Error(`${method} ${path}: ${answer.status} ${await answer.text()}`);
    return (await answer.json()) as T;
  };
  await call('POST', '/api/auth/sign-in', {
    email: 'tech@quarrylane.example',
    password: demoAccounts.password,
  });
  return {
    pid: child.pid ?? 0,
    call,
    upload: (path, pieces) => upload(origin + path, headers, pieces),
    stop: async () => {
      child.kill('SIGTERM');
      await once(child, 'exit');
    },
  };
}

async function upload(url: string, headers: Record<string, string>, pieces: Iterable<Uint8Array>) {
  const outgoing = request(url, {
    method: 'POST',
    headers: { ...headers, 'Content-Type': 'multipart/form-data; boundary=piece' },
  });
  const answered = once(outgoing, 'response') as Promise<[import('node:http').IncomingMessage]>;
  const part = 'Content-Disposition: form-data; name="file"; filename="log.csv"\r\nContent-Type: text/csv';
  outgoing.write(`--piece\r\n${part}\r\n\r\n`);
  for (const piece of pieces) if (!outgoing.write(piece)) await once(outgoing, 'drain');
  outgoing.end('\r\n--piece--\r\n');
  const [answer] = await answered;
  let body = '';
  for await (const chunk of answer) body += String(chunk);
  return { status: answer.statusCode ?? 0, body };
}

/** Resident memory of a process now, bytes. */
export function residentBytes(pid: number): number {
  const line = /VmRSS:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'));
  return Number(line?.[1] ?? NaN) * 1024;
}
