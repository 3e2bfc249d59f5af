import { z } from '../zod';
import {
  emailSchema,
  emptySchema,
  idSchema,
  instantSchema,
  listOf,
  nameSchema,
  roleSchema,
  unitsSchema,
} from './common';
import { defineRoute } from './route';

export const passwordSchema = z.string().min(10).max(200);
export const themeSchema = z.enum(['auto', 'light', 'dark']);

export const meSchema = z.strictObject({
  user: z.strictObject({ id: idSchema, name: z.string(), email: z.string() }),
  studio: z.strictObject({ id: idSchema, name: z.string(), timeZone: z.string(), units: unitsSchema }),
  roles: z.array(roleSchema),
  /** The person's own choice where it differs from the studio's. */
  preferences: z.strictObject({ units: unitsSchema.nullable(), theme: themeSchema }),
});
export type Me = z.infer<typeof meSchema>;

export const sessionSchema = z.strictObject({
  id: idSchema,
  createdAt: instantSchema,
  lastSeenAt: instantSchema,
  /** What the browser said it was, shortened; for the person's own recognition only. */
  device: z.string(),
  current: z.boolean(),
});

export const authRoutes = {
  signIn: defineRoute({
    method: 'POST',
    path: '/api/auth/sign-in',
    summary: 'Sign in',
    response: meSchema,
    problems: [401, 429],
    body: z.strictObject({ email: emailSchema, password: z.string().min(1).max(200) }),
  }),
  signOut: defineRoute({
    method: 'POST',
    path: '/api/auth/sign-out',
    summary: 'Sign out',
    response: emptySchema,
  }),
  me: defineRoute({ method: 'GET', path: '/api/auth/me', summary: 'Who is signed in', response: meSchema }),
  setUp: defineRoute({
    method: 'POST',
    path: '/api/setup',
    summary: 'Make the first owner, with the one-time link printed at the first start',
    response: meSchema,
    status: 201,
    problems: [404, 409],
    body: z.strictObject({
      token: z.string().min(20).max(200),
      studioName: nameSchema,
      timeZone: z.string().min(1).max(60),
      name: nameSchema,
      email: emailSchema,
      password: passwordSchema,
    }),
  }),
  updateAccount: defineRoute({
    method: 'PATCH',
    path: '/api/account',
    summary: 'Change own name, units or theme',
    response: meSchema,
    body: z.strictObject({
      name: nameSchema.optional(),
      units: unitsSchema.nullable().optional(),
      theme: themeSchema.optional(),
    }),
  }),
  changePassword: defineRoute({
    method: 'POST',
    path: '/api/account/password',
    summary: 'Change own password; other sessions end',
    response: emptySchema,
    body: z.strictObject({ currentPassword: z.string().min(1).max(200), newPassword: passwordSchema }),
    problems: [429],
  }),
  sessions: defineRoute({
    method: 'GET',
    path: '/api/account/sessions',
    summary: 'Own sessions',
    response: listOf(sessionSchema),
  }),
  endSession: defineRoute({
    method: 'DELETE',
    path: '/api/account/sessions/{id}',
    summary: 'End one of own sessions',
    response: emptySchema,
  }),
};
