import { z } from '~/lib/zod';

/** Sessions are signed with it; anything shorter than 32 characters could be guessed. */
const secretSchema = z.string().min(32, 'HOLDFAST_SECRET must hold at least 32 characters');

const originSchema = z
  .url({
    protocol: /^https$/,
    error: 'HOLDFAST_ORIGIN must be the https address people use, such as https://firing.example',
  })
  .transform((text) => new URL(text).origin);

const environmentSchema = z
  .object({
    HOLDFAST_MODE: z.enum(['demo', 'production']).default('demo'),
    /** Where the application connects, as the role that owns nothing. `npm start` works it out of DATABASE_URL. */
    DATABASE_APP_URL: z
      .string()
      .regex(/^postgres(ql)?:\/\//, 'DATABASE_APP_URL must be a postgres:// address'),
    HOLDFAST_SECRET: secretSchema,
    HOLDFAST_ORIGIN: originSchema.optional(),
    HOLDFAST_MAX_UPLOAD_BYTES: z.coerce
      .number()
      .int()
      .min(1024)
      .max(2 ** 40)
      .default(2 ** 30),
    HOLDFAST_LOG: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
    HOLDFAST_DATABASE_CONNECTIONS: z.coerce.number().int().min(1).max(200).default(10),
  })
  .refine((env) => env.HOLDFAST_MODE === 'demo' || env.HOLDFAST_ORIGIN !== undefined, {
    path: ['HOLDFAST_ORIGIN'],
    message: 'production mode needs HOLDFAST_ORIGIN, the https address people use',
  });

export interface Config {
  readonly mode: 'demo' | 'production';
  readonly databaseUrl: string;
  readonly databaseConnections: number;
  readonly secret: string;
  /** The site's own address in production; null in demo mode, where any loopback address on any port is the site. */
  readonly origin: string | null;
  readonly maxUploadBytes: number;
  readonly logLevel: string;
}

/** Parses an environment. Throws with every fault named, so that a start refuses before it serves anything. */
export function parseConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const result = environmentSchema.safeParse(
    Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== '')),
  );
  if (!result.success) {
    const faults = result.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The environment is not complete.\n  ${faults.join('\n  ')}`);
  }
  const env = result.data;
  return {
    mode: env.HOLDFAST_MODE,
    databaseUrl: env.DATABASE_APP_URL,
    databaseConnections: env.HOLDFAST_DATABASE_CONNECTIONS,
    secret: env.HOLDFAST_SECRET,
    origin: env.HOLDFAST_MODE === 'production' ? (env.HOLDFAST_ORIGIN ?? null) : null,
    maxUploadBytes: env.HOLDFAST_MAX_UPLOAD_BYTES,
    logLevel: env.HOLDFAST_LOG,
  };
}

let parsed: Config | undefined;

/** The environment, parsed once, at first use. Nothing else in the application reads `process.env`. */
export function config(): Config {
  parsed ??= parseConfig(process.env);
  return parsed;
}
