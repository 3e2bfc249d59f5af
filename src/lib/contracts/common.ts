import { z } from '../zod';

export const ROLES = ['owner', 'technician', 'teacher', 'student'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

/** RFC 9562, section 4: read in capital and small letters alike, kept in small ones, as the database answers it. */
export const idSchema = z.uuid().toLowerCase();
/** An instant in RFC 3339, UTC, with `Z`. The database has no year 0. */
export const instantSchema = z.iso
  .datetime()
  .refine((text) => !text.startsWith('0000'), 'there is no year 0');
export const revisionSchema = z.number().int().min(1);
/** Number of a version of a profile, as addresses take it: at most nine digits. */
export const versionNumberSchema = z.number().int().min(1).max(999_999_999);

/** At least one sign that can be seen: a letter, a digit, a mark of punctuation or a symbol. */
const isVisible = (text: string): boolean => /[\p{L}\p{N}\p{P}\p{S}]/u.test(text);
/** Control characters and ends of lines become a space; what turns the order of letters round is taken out. */
const onOneLine = (text: string): string =>
  text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').replace(/[\u202a-\u202e\u2066-\u2069]/g, '');

/** A name as lists and headings show it: on one line, and to be seen. */
export const nameSchema = z
  .string()
  .overwrite(onOneLine)
  .trim()
  .min(1)
  .max(120)
  .refine(isVisible, 'a name needs a letter, a digit or a sign');
export const noteSchema = z.string().trim().max(4000);
/** A text that must say something: a reason, a remark. */
export const wordsSchema = (maxLength: number) =>
  z.string().trim().min(1).max(maxLength).refine(isVisible, 'say it in words');
export const emailSchema = z
  .email()
  .max(254)
  .transform((text) => text.toLowerCase());

export const listQuerySchema = z.strictObject({
  limit: z.coerce.number().int().min(1).max(200).default(50),
  cursor: z.string().max(400).optional(),
  q: z.string().trim().max(200).optional(),
});
export type ListQuery = z.infer<typeof listQuerySchema>;

export const listOf = <T extends z.ZodType>(item: T) =>
  z.strictObject({ items: z.array(item), nextCursor: z.string().nullable() });

export const unitsSchema = z.strictObject({
  temperature: z.enum(['C', 'F']),
  mass: z.enum(['kg', 'lb']),
  length: z.enum(['mm', 'in']),
});
export type Units = z.infer<typeof unitsSchema>;

/** RFC 9457 problem details, with this API's stable `code`. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  code: z.string(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** On 412: the newer thing. */
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;

export const personSchema = z.strictObject({ id: idSchema, name: z.string() });
export const emptySchema = z.strictObject({});
