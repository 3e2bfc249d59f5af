import { z } from '../zod';

export const ROLES = ['owner', 'technician', 'teacher', 'student'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

export const idSchema = z.uuid();
/** An instant in RFC 3339, UTC, with `Z`. */
export const instantSchema = z.iso.datetime();
export const revisionSchema = z.number().int().min(1);
export const nameSchema = z.string().trim().min(1).max(120);
export const noteSchema = z.string().trim().max(4000);
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
