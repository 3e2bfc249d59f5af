import { keptKey } from './keys.mjs';
import { Stop } from './say.mjs';

/** HOLDFAST_MODE, and in production what it cannot do without: said before anything is installed or started. */
export function modeOf(environment = process.env) {
  const mode = environment.HOLDFAST_MODE || 'demo';
  if (mode !== 'demo' && mode !== 'production')
    throw new Stop(`HOLDFAST_MODE is '${mode}'; expected demo or production.`);
  if (mode === 'production') refuseIncomplete(environment);
  return mode;
}

function refuseIncomplete(environment) {
  const missing = [];
  if ((environment.HOLDFAST_SECRET ?? '').length < 32)
    missing.push('HOLDFAST_SECRET: at least 32 random characters, which sign the sessions');
  if (!/^https:\/\/[^/]+\/?$/.test(environment.HOLDFAST_ORIGIN ?? ''))
    missing.push('HOLDFAST_ORIGIN: the https address people use, such as https://firing.example');
  if (missing.length > 0) throw new Stop(`Production mode needs\n  ${missing.join('\n  ')}`);
}

/** What signs the sessions: given in production; in demo mode made at the first start and kept. */
export const secretOf = (data, mode) =>
  mode === 'production'
    ? process.env.HOLDFAST_SECRET
    : process.env.HOLDFAST_SECRET || keptKey(data, 'secret');
