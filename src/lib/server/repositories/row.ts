import { z } from '~/lib/zod';

/** A timestamp of a row as the instant the API gives: RFC 3339, UTC, milliseconds. */
export const rowInstant = z.date().transform((date) => date.toISOString());

/** `text` as a pattern for `ilike` that matches it anywhere, whatever signs are in it. */
export const likeAnywhere = (text: string): string => `%${text.replace(/[\\%_]/g, '\\$&')}%`;

/** Whether a string is a UUID, so that the database can be asked for it at all. */
export const isUuid = (text: string): boolean => z.guid().safeParse(text).success;

const keptInstants = z.looseObject({
  createdAt: rowInstant,
  updatedAt: rowInstant,
  archivedAt: rowInstant.nullable(),
});

/** A row of equipment with its instants as the API gives them, without the columns named. */
export function keptRow(
  row: Readonly<Record<string, unknown>>,
  ...without: readonly string[]
): Record<string, unknown> {
  const left = Object.entries(row).filter(
    ([name]) => !['studioId', 'nameKey'].includes(name) && !without.includes(name),
  );
  return keptInstants.parse(Object.fromEntries(left));
}

/** A timestamp column as text in SQL, for instants inside JSON: RFC 3339, UTC, milliseconds. */
export const instantOf = (column: string): string =>
  `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;
