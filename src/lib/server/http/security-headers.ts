import { config } from '../config';

/** Headers of every answer the application gives. The content security policy of pages comes from the build. */
const ALWAYS: Readonly<Record<string, string>> = {
  'x-content-type-options': 'nosniff',
  // Not `no-referrer`: under it a browser sends `Origin: null` with a plain form, which the origin check refuses.
  'referrer-policy': 'same-origin',
  'x-frame-options': 'DENY',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=(), interest-cohort=()',
};

/** An answer that is no page may load and show nothing at all. */
const NOTHING = "default-src 'none'; frame-ancestors 'none'";

export function setSecurityHeaders(headers: Headers): void {
  for (const [name, value] of Object.entries(ALWAYS)) headers.set(name, value);
  // Pages bring their own policy from the build; those of the development server have none.
  const isPage = (headers.get('content-type') ?? '').startsWith('text/html');
  if (!isPage) headers.set('content-security-policy', NOTHING);
  if (!headers.has('cache-control')) headers.set('cache-control', 'no-store');
  if (config().mode === 'production')
    headers.set('strict-transport-security', 'max-age=31536000; includeSubDomains');
}
