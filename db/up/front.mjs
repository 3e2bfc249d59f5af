/**
 * What stands between the socket and the application: what comes from outside and must not be believed is taken away,
 * files get their headers, and the framework's own routes that Holdfast does not use are closed.
 */

const FORWARDED = [
  'forwarded',
  'x-forwarded-for',
  'x-forwarded-host',
  'x-forwarded-port',
  'x-forwarded-proto',
];
/** On a file these make the framework answer 500, and nothing edits files over HTTP. */
const CONDITIONS = ['if-match', 'if-unmodified-since'];
const CLOSED = ['/_image', '/_server-islands'];

const HEADERS = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'x-frame-options': 'DENY',
};

export function frontOf(handler, { trustedProxies = [], https = false } = {}) {
  return (request, response) => {
    const path = pathOf(request.url);
    const client = clientOf(request, trustedProxies);
    for (const name of FORWARDED) delete request.headers[name];
    if (client) request.headers['x-forwarded-for'] = client;
    if (https) request.headers['x-forwarded-proto'] = 'https';
    for (const [name, value] of Object.entries(HEADERS)) response.setHeader(name, value);
    if (path === null || CLOSED.some((closed) => path === closed || path.startsWith(`${closed}/`)))
      return refuse(response, path === null ? 400 : 404);
    if (!path.startsWith('/api/')) for (const name of CONDITIONS) delete request.headers[name];
    return handler(request, response);
  };
}

/** The path in plain letters; null where path or query cannot be read. */
function pathOf(url) {
  try {
    const { pathname, search } = new URL(url ?? '/', 'http://localhost');
    decodeURIComponent(search);
    return decodeURIComponent(pathname);
  } catch {
    return null;
  }
}

/** Behind a proxy of ours the last address it noted is the visitor's; what anybody else wrote there is not believed. */
function clientOf(request, trustedProxies) {
  const peer = (request.socket.remoteAddress ?? '').replace(/^::ffff:/, '');
  if (!trustedProxies.includes(peer)) return null;
  return (
    String(request.headers['x-forwarded-for'] ?? '')
      .split(',')
      .at(-1)
      .trim() || null
  );
}

function refuse(response, status) {
  const [code, title] =
    status === 400
      ? ['malformed', 'The request could not be read']
      : ['not-found', 'There is nothing here that you can see'];
  const body = {
    type: `/problems/${code}`,
    title,
    status,
    detail: 'There is nothing at this address.',
    code,
  };
  response.writeHead(status, { 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
  response.end(JSON.stringify(body));
}
