import { config } from '../config';
import { HoldfastError } from '../errors';

const SAFE_METHODS: readonly string[] = ['GET', 'HEAD', 'OPTIONS'];
const LOOPBACK = /^(localhost|127\.0\.0\.1|\[::1\])(:\d{1,5})?$/i;

/**
 * The address people reach this site by: HOLDFAST_ORIGIN in production; in demo mode the loopback address and port of
 * the request itself. A name that only points at this machine is refused, so that no other page can pose as the site.
 */
export function siteOrigin(request: Request): string {
  const { origin } = config();
  const host = request.headers.get('host') ?? '';
  if (origin === null) {
    if (!LOOPBACK.test(host)) throw strange(host, 'an address of this machine, such as http://127.0.0.1');
    return `http://${host.toLowerCase()}`;
  }
  if (host.toLowerCase() !== new URL(origin).host) throw strange(host, origin);
  return origin;
}

const strange = (host: string, expected: string) =>
  new HoldfastError(
    'malformed',
    `The request is for '${host.slice(0, 80)}'; this site answers at ${expected}.`,
  );

/** Refuses an unsafe call that does not say it comes from the site itself, whatever its content type. */
export function requireOwnOrigin(request: Request, site: string): void {
  if (SAFE_METHODS.includes(request.method)) return;
  const origin = request.headers.get('origin');
  if (origin === site) return;
  throw new HoldfastError(
    'foreign-origin',
    origin === null
      ? 'The call has no Origin header; calls that change something must carry that of this site.'
      : `The call comes from '${origin.slice(0, 120)}'; only pages of this site may make it.`,
  );
}
