import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import supertest, { type Test } from 'supertest';
import { afterAll } from 'vitest';
import { needBuild } from '../../db/up/build.mjs';
import { ROOT } from '../../db/up/root.mjs';
import { demoAccounts, type DemoKey } from '../../db/seeds/people';
import { testDatabase, type TestDatabase } from './database';

/** One browser: keeps its cookies and sends the site's Origin, as a page of the site would. */
export interface Visitor {
  readonly agent: ReturnType<typeof supertest.agent>;
  get(path: string): Test;
  post(path: string, body?: object): Test;
  put(path: string, body: object, revision?: number): Test;
  patch(path: string, body: object, revision?: number): Test;
  delete(path: string): Test;
}

export interface TestApp {
  readonly url: string;
  readonly db: TestDatabase;
  readonly pid: number;
  /** A visitor who has not signed in. */
  visitor(): Visitor;
  /** One of the demo's people, signed in; the same visitor each time. */
  as(person: DemoKey): Promise<Visitor>;
}

/**
 * The built application in a process of its own, on a database of this file's own. Built first where the source
 * changed. Call it once at the top of a test file: `const app = await testApp();`
 */
export async function testApp(environment: Readonly<Record<string, string>> = {}): Promise<TestApp> {
  const db = await testDatabase();
  const server = await startServer(environment);
  afterAll(() => server.stop());
  return appOver(server, db);
}

export interface TestServer {
  readonly url: string;
  readonly child: ChildProcess;
  stop(): Promise<void>;
}

/** One more process that serves the build on the database of this file. */
export async function startServer(environment: Readonly<Record<string, string>> = {}): Promise<TestServer> {
  const child = spawn(process.execPath, [join(ROOT, 'db/up/serve.mjs'), await needBuild()], {
    env: { ...process.env, NODE_ENV: 'production', PORT: '0', HOST: '127.0.0.1', ...environment },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  });
  const [message] = (await Promise.race([
    once(child, 'message'),
    once(child, 'exit').then(([code]) => Promise.reject(new Error(`the server ended with ${String(code)}`))),
  ])) as [{ port: number }];
  return {
    url: `http://127.0.0.1:${message.port}`,
    child,
    stop: async () => {
      if (child.exitCode !== null || child.signalCode !== null) return;
      child.kill('SIGTERM');
      await once(child, 'exit');
    },
  };
}

function appOver(server: TestServer, db: TestDatabase): TestApp {
  const { url } = server;
  const signedIn = new Map<DemoKey, Promise<Visitor>>();
  const enter = async (person: DemoKey): Promise<Visitor> => {
    const visitor = visitorOf(url);
    const body = { email: db.people[person].email, password: demoAccounts.password };
    await visitor.post('/api/auth/sign-in', body).expect(200);
    return visitor;
  };
  return {
    url,
    db,
    pid: server.child.pid ?? 0,
    visitor: () => visitorOf(url),
    as: (person) => {
      const known = signedIn.get(person) ?? enter(person);
      signedIn.set(person, known);
      return known;
    },
  };
}

export function visitorOf(url: string): Visitor {
  const agent = supertest.agent(url).set('Origin', url);
  const withRevision = (test: Test, revision?: number) =>
    revision === undefined ? test : test.set('If-Match', `"${revision}"`);
  return {
    agent,
    get: (path) => agent.get(path),
    post: (path, body = {}) => agent.post(path).send(body),
    put: (path, body, revision) => withRevision(agent.put(path).send(body), revision),
    patch: (path, body, revision) => withRevision(agent.patch(path).send(body), revision),
    delete: (path) => agent.delete(path),
  };
}
