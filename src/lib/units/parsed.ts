/** What a person typed, understood or not. An issue says what was found and what is expected. */
export type Parsed<T = number> = { ok: true; value: T } | { ok: false; issue: string };

export const understood = <T>(value: T): Parsed<T> => ({ ok: true, value });
export const notUnderstood = (issue: string): { ok: false; issue: string } => ({ ok: false, issue });

/** Text with every kind of space and minus sign made plain, trimmed, at most 80 characters. */
export function plainText(text: string): string {
  return text
    .slice(0, 80)
    .replace(/[\u00a0\u2000-\u200a\u202f\u3000\t]/g, ' ')
    .replace(/[\u2012-\u2015\u2212]/g, '-')
    .replace(/[\u2018\u2019\u2032]/g, "'")
    .replace(/[\u201c\u201d\u2033]/g, '"')
    .replace(/º/g, '°')
    .trim();
}
