import { z } from 'zod';

/** The only place that reads the environment. Every name is explained in `.env.example`. */
const environmentSchema = z
  .object({
    NODE_ENV: z.string().default('development'),
    APP_MODE: z.enum(['demo', 'production']).default('demo'),
    PORT: z.coerce.number().int().min(1).max(65535).default(3000),
    DATA_DIR: z.string().default('./data'),
    BASE_URL: z.url().optional(),
    SESSION_SECRET: z.string().min(32).optional(),
    DEMO_PASSWORD: z.string().min(8).default('larkmoor-demo'),
    SMTP_URL: z.string().optional(),
    MAIL_FROM: z.string().default('Benchwright <benchwright@larkmoor.example>'),
    STRIPE_SECRET_KEY: z.string().optional(),
    STRIPE_API_BASE: z.url().optional(),
    STRIPE_WEBHOOK_SECRET: z.string().optional(),
    SUPPLIER_API_BASE: z.url().optional(),
    SUPPLIER_API_KEY: z.string().optional(),
    RATE_LIMITS: z.enum(['normal', 'relaxed']).default('normal'),
    LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  })
  .transform((env) => ({ ...env, BASE_URL: env.BASE_URL ?? `http://localhost:${env.PORT}` }));

export type Environment = z.infer<typeof environmentSchema>;

/** Secrets too well known to protect anything. */
const KNOWN_SECRETS = ['change-me', 'secret', 'development'];

/**
 * Reads and checks an environment.
 * @throws Error that names each bad variable, and in production each missing or well-known secret
 */
export function parseEnvironment(source: Readonly<Record<string, string | undefined>>): Environment {
  const filled = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ''));
  const result = environmentSchema.safeParse(filled);
  if (!result.success) throw new Error(`Environment: ${z.prettifyError(result.error)}`);
  const env = result.data;
  if (env.APP_MODE === 'production') {
    const faults: string[] = [];
    const secret = env.SESSION_SECRET;
    if (!secret || KNOWN_SECRETS.some((known) => secret.startsWith(known)))
      faults.push('SESSION_SECRET must be your own');
    if (env.DEMO_PASSWORD === 'larkmoor-demo' && source.DEMO_PASSWORD)
      faults.push('DEMO_PASSWORD must not be the demo one');
    if (!env.SMTP_URL) faults.push('SMTP_URL is missing');
    if (faults.length > 0) throw new Error(`Environment: ${faults.join('; ')}`);
  }
  return env;
}

let parsed: Environment | undefined;

/** The environment of this process, read once. */
export function environment(): Environment {
  parsed ??= parseEnvironment(process.env);
  return parsed;
}
