/**
 * Canonical JSON after RFC 8785 (JSON Canonicalization Scheme): no white space, members sorted by the UTF-16 code
 * units of their names, numbers and strings as ECMAScript writes them. Equal content gives equal text, whatever the
 * order in which it was built.
 *
 * @param value JSON data: null, booleans, finite numbers, strings, arrays, plain objects
 * @returns the canonical text; its seal is the digest of its UTF-8 bytes
 * @throws TypeError for what JSON cannot hold: NaN, Infinity, undefined, functions, text with a lone surrogate
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'number') return canonicalNumber(value);
  if (typeof value === 'string') return canonicalString(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value !== 'object') throw new TypeError(`a ${typeof value} has no canonical JSON`);
  const members = Object.entries(value)
    .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
    .map(([name, member]) => `${canonicalString(name)}:${canonicalJson(member)}`);
  return `{${members.join(',')}}`;
}

function canonicalNumber(value: number): string {
  if (!Number.isFinite(value)) throw new TypeError(`${value} has no canonical JSON`);
  return JSON.stringify(value);
}

function canonicalString(text: string): string {
  if (!isWellFormed(text)) throw new TypeError('text with a lone surrogate has no canonical JSON');
  return JSON.stringify(text);
}

/** Whether every surrogate is half of a pair. */
function isWellFormed(text: string): boolean {
  for (let at = 0; at < text.length; at += 1) {
    const unit = text.charCodeAt(at);
    if (unit < 0xd800 || unit > 0xdfff) continue;
    const next = text.charCodeAt(at + 1);
    if (unit > 0xdbff || !(next >= 0xdc00 && next <= 0xdfff)) return false;
    at += 1;
  }
  return true;
}
