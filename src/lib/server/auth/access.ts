import { ROLES, type Role } from '~/lib/contracts/common';
import type { Method } from '~/lib/contracts/route';

/** Who may come as far as the service: anyone, whoever is signed in, or the holders of one of some roles. */
export type Who = 'anyone' | 'signed-in' | readonly Role[];

export interface AccessRule {
  /** A file of `src/pages` as a pattern: `/api/kilns/[id]`. */
  readonly path: string;
  readonly methods: Readonly<Partial<Record<Method, Who>>>;
}

const STAFF: Who = ['owner', 'technician', 'teacher'];
const KILN_KEEPERS: Who = ['owner', 'technician'];
const TEACHERS: Who = ['owner', 'teacher'];
const REVIEWERS: Who = ['owner', 'technician', 'teacher'];
const EVERY_ROLE: Who = ROLES;

/** A page is read, and takes the plain forms that stand on it. */
const page = (path: string, who: Who): AccessRule => ({ path, methods: { GET: who, POST: who } });
/** A page with a plain form that posts to the page itself. */
const formPage = (path: string, who: Who): AccessRule => ({ path, methods: { GET: who, POST: who } });
const api = (path: string, methods: AccessRule['methods']): AccessRule => ({ path: `/api${path}`, methods });

/**
 * Everything that can be asked of the site, and who may ask. What is not here is refused. Whose things they are (own
 * work, a handout, this studio) is for the services; this table only keeps out those whose role never may.
 */
export const ACCESS: readonly AccessRule[] = [
  // ---------------------------------------------------------------- pages
  page('/', EVERY_ROLE),
  page('/404', 'anyone'),
  page('/500', 'anyone'),
  formPage('/sign-in', 'anyone'),
  formPage('/set-up', 'anyone'),
  formPage('/sign-out', 'anyone'),
  formPage('/account', EVERY_ROLE),
  page('/kilns', EVERY_ROLE),
  page('/kilns/new', KILN_KEEPERS),
  formPage('/kilns/[id]', EVERY_ROLE),
  page('/kilns/[id]/edit', KILN_KEEPERS),
  page('/thermocouples', STAFF),
  page('/thermocouples/new', KILN_KEEPERS),
  formPage('/thermocouples/[id]', KILN_KEEPERS),
  page('/tariffs', STAFF),
  page('/tariffs/new', KILN_KEEPERS),
  formPage('/tariffs/[id]', KILN_KEEPERS),
  page('/furnaces', STAFF),
  page('/furnaces/new', KILN_KEEPERS),
  formPage('/furnaces/[id]', KILN_KEEPERS),
  page('/materials', EVERY_ROLE),
  formPage('/materials/[kind]/[id]', KILN_KEEPERS),
  page('/methods', EVERY_ROLE),
  page('/profiles', EVERY_ROLE),
  formPage('/profiles/new', EVERY_ROLE),
  formPage('/profiles/[id]', EVERY_ROLE),
  page('/profiles/[id]/versions/[n]', EVERY_ROLE),
  page('/profiles/[id]/versions/[n]/print', EVERY_ROLE),
  page('/runs', EVERY_ROLE),
  formPage('/runs/new', EVERY_ROLE),
  formPage('/runs/[id]', EVERY_ROLE),
  page('/classes', TEACHERS),
  formPage('/classes/new', TEACHERS),
  formPage('/classes/[id]', TEACHERS),
  page('/handouts', EVERY_ROLE),
  formPage('/handouts/new', TEACHERS),
  formPage('/handouts/[id]', EVERY_ROLE),
  page('/handouts/[id]/print', EVERY_ROLE),

  // ---------------------------------------------------------------- the site itself
  api('/health', { GET: 'anyone' }),
  api('/openapi.json', { GET: 'anyone' }),
  api('/setup', { POST: 'anyone' }),
  api('/auth/sign-in', { POST: 'anyone' }),
  api('/auth/sign-out', { POST: 'signed-in' }),
  api('/auth/me', { GET: 'signed-in' }),
  api('/account', { PATCH: 'signed-in' }),
  api('/account/password', { POST: 'signed-in' }),
  api('/account/sessions', { GET: 'signed-in' }),
  api('/account/sessions/[id]', { DELETE: 'signed-in' }),
  api('/people', { GET: STAFF }),

  // ---------------------------------------------------------------- equipment
  api('/kilns', { GET: EVERY_ROLE, POST: KILN_KEEPERS }),
  api('/kilns/[id]', { GET: EVERY_ROLE, PATCH: KILN_KEEPERS }),
  api('/furnaces', { GET: EVERY_ROLE, POST: KILN_KEEPERS }),
  api('/furnaces/[id]', { GET: EVERY_ROLE, PATCH: KILN_KEEPERS }),
  api('/thermocouples', { GET: EVERY_ROLE, POST: KILN_KEEPERS }),
  api('/thermocouples/[id]', { GET: EVERY_ROLE, PATCH: KILN_KEEPERS }),
  api('/tariffs', { GET: STAFF, POST: KILN_KEEPERS }),
  api('/tariffs/[id]', { GET: STAFF, PATCH: KILN_KEEPERS }),
  api('/materials', { GET: EVERY_ROLE }),
  api('/materials/[kind]/[id]/figures', { POST: KILN_KEEPERS }),

  // ---------------------------------------------------------------- profiles
  api('/estimates', { POST: EVERY_ROLE }),
  api('/drafts', { POST: EVERY_ROLE }),
  api('/profiles', { GET: EVERY_ROLE, POST: EVERY_ROLE }),
  api('/profiles/[id]', { GET: EVERY_ROLE, PATCH: EVERY_ROLE }),
  api('/profiles/[id]/duplicate', { POST: EVERY_ROLE }),
  api('/profiles/[id]/versions', { POST: EVERY_ROLE }),
  api('/profiles/[id]/versions/[n]', { GET: EVERY_ROLE, PUT: EVERY_ROLE }),
  api('/profiles/[id]/versions/[n]/submit', { POST: EVERY_ROLE }),
  api('/profiles/[id]/versions/[n]/approve', { POST: TEACHERS }),
  api('/profiles/[id]/versions/[n]/return', { POST: TEACHERS }),
  api('/profiles/[id]/versions/[n]/retire', { POST: REVIEWERS }),

  // ---------------------------------------------------------------- classes and handouts
  api('/classes', { GET: EVERY_ROLE, POST: TEACHERS }),
  api('/classes/[id]', { GET: EVERY_ROLE, PATCH: TEACHERS }),
  api('/handouts', { GET: EVERY_ROLE, POST: TEACHERS }),
  api('/handouts/[id]', { GET: EVERY_ROLE }),
  api('/handouts/[id]/acknowledge', { POST: EVERY_ROLE }),
  api('/handouts/[id]/withdraw', { POST: TEACHERS }),

  // ---------------------------------------------------------------- runs, their logs and findings
  api('/runs', { GET: EVERY_ROLE, POST: EVERY_ROLE }),
  api('/runs/[id]', { GET: EVERY_ROLE, PATCH: EVERY_ROLE }),
  api('/runs/[id]/start', { POST: EVERY_ROLE }),
  api('/runs/[id]/finish', { POST: EVERY_ROLE }),
  api('/runs/[id]/abandon', { POST: EVERY_ROLE }),
  api('/runs/[id]/sign-off', { POST: ['technician', 'teacher'] }),
  api('/runs/[id]/review', { GET: EVERY_ROLE }),
  api('/runs/[id]/series', { GET: EVERY_ROLE }),
  api('/runs/[id]/findings', { GET: EVERY_ROLE, POST: ['technician', 'teacher'] }),
  api('/runs/[id]/findings/[findingId]', { PATCH: ['technician', 'teacher'] }),
  api('/runs/[id]/logs', { POST: EVERY_ROLE }),
  api('/runs/[id]/logs/[logId]', { GET: EVERY_ROLE, PATCH: EVERY_ROLE }),
  api('/runs/[id]/logs/[logId]/original', { GET: EVERY_ROLE }),
  api('/runs/[id]/logs/[logId]/answers', { POST: EVERY_ROLE }),
];

const RULES: ReadonlyMap<string, AccessRule> = new Map(ACCESS.map((rule) => [rule.path.toLowerCase(), rule]));

/** The rule of a route as the router matched it (it gives its patterns in small letters); undefined where there is none. */
export const ruleOf = (routePattern: string): AccessRule | undefined =>
  RULES.get(routePattern.length > 1 ? routePattern.replace(/\/$/, '').toLowerCase() : routePattern);

/** Whether every method that the route has is for anyone: nothing about it depends on who asks. */
export const isOpen = (rule: AccessRule | undefined): boolean =>
  Object.values(rule?.methods ?? {}).every((who) => who === 'anyone');

/** What the table says of one request. `unlisted`: nothing is offered there. */
export function judge(
  routePattern: string,
  method: string,
  roles: readonly Role[] | null,
): 'allowed' | 'unlisted' | 'wrong-method' | 'sign-in-first' | 'wrong-role' {
  const rule = ruleOf(routePattern);
  if (!rule) return 'unlisted';
  const who = rule.methods[(method === 'HEAD' ? 'GET' : method) as Method];
  if (who === 'anyone') return 'allowed';
  if (!roles && !isOpen(rule)) return 'sign-in-first';
  if (who === undefined) return 'wrong-method';
  if (who === 'signed-in') return 'allowed';
  return who.some((role) => roles?.includes(role)) ? 'allowed' : 'wrong-role';
}
