import 'server-only';
import * as z from 'zod';

const LOOPBACK = ['127.0.0.1', 'localhost', '::1'];

const schema = z
  .object({
    /** The one file that holds the school. */
    DATABASE_FILE: z.string().min(1).default('var/school.db'),
    /** Where people reach the school; used in mails and as the only origin that may change anything. */
    NEXTAUTH_URL: z.url().default('http://localhost:3000'),
    /** Signs the session cookie; at least 32 characters. `npm run up` makes one in var/. */
    NEXTAUTH_SECRET: z.string().min(32).optional(),
    SMTP_HOST: z.string().default('127.0.0.1'),
    SMTP_PORT: z.coerce.number().int().positive().default(2525),
    SMTP_SECURE: z.stringbool().default(false),
    SMTP_USER: z.string().optional(),
    SMTP_PASSWORD: z.string().optional(),
    MAIL_FROM: z.email().default('office@example.org'),
    STRIPE_SECRET_KEY: z.string().default('sk_test_local'),
    STRIPE_WEBHOOK_SECRET: z.string().default('whsec_local'),
    /** Set to point the SDK at the local card processor; left out, it talks to the real one. */
    STRIPE_API_HOST: z.string().optional(),
    STRIPE_API_PORT: z.coerce.number().int().positive().optional(),
    STRIPE_API_PROTOCOL: z.enum(['http', 'https']).default('https'),
    /** Pages of the local mail sink, shown to the demo school only. */
    MAIL_SINK_URL: z.url().optional(),
    CARD_PROCESSOR_URL: z.url().optional(),
    LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
    NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  })
  .refine((env) => env.STRIPE_API_PROTOCOL === 'https' || LOOPBACK.includes(env.STRIPE_API_HOST ?? ''), {
    message: 'STRIPE_API_PROTOCOL=http is for the local card processor on this machine only',
  });

export type Env = z.output<typeof schema>;

let read: Env | undefined;

/** Every setting from outside, read once. An empty value counts as not set. */
export function env(): Env {
  if (read) return read;
  const given = Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== ''));
  const parsed = schema.safeParse(given);
  if (!parsed.success) throw new Error(`The environment is not usable.\n${z.prettifyError(parsed.error)}`);
  read = parsed.data;
  return read;
}
