import { z } from 'zod';

const origin = z
  .url({ protocol: /^https?$/ })
  .refine((text) => new URL(text).origin === text, { error: 'no path and no slash at the end' });

const envSchema = z.object({
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }),
  /** Where people's browsers find us: https://host. */
  APP_ORIGIN: origin,
  SMTP_URL: z.url({ protocol: /^smtps?$/ }),
  /** Somebody must read what is answered to it: mails ask people to answer in an emergency. */
  MAIL_FROM: z.string().min(3).default('Flightcase <hello@flightcase.example>'),
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(8080),
  /** The built client; empty where something else serves it. */
  CLIENT_DIR: z.string().default('dist/client'),
  NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  /** Proxies of our own in front of this server. */
  TRUSTED_PROXIES: z.coerce.number().int().min(0).max(10).default(0),
});
export type Env = z.output<typeof envSchema>;

/**
 * Reads the environment once. Throws an error whose message is one sentence for each variable
 * that is missing or wrong; values are not quoted, some are secrets.
 */
export function readEnv(variables: Record<string, string | undefined>): Env {
  const result = envSchema.safeParse(variables);
  if (result.success) return result.data;
  const sentences = result.error.issues.map((issue) => {
    const name = String(issue.path[0]);
    const given = variables[name] !== undefined;
    return given ? `${name} is not right: ${issue.message}.` : `Please set ${name}.`;
  });
  throw new Error(`The server cannot start. ${sentences.join(' ')}`);
}
