import path from 'node:path';
import { z } from 'zod';

const flag = z.enum(['0', '1', 'true', 'false']).transform((value) => value === '1' || value === 'true');

const settings = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('development'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(4600),
  HOST: z.string().min(1).default('127.0.0.1'),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  // How many proxies stand in front, or their addresses.
  TRUST_PROXY: z.union([z.coerce.number().int().positive(), z.string()]).optional(),
  DATA_DIR: z.string().min(1).default('.data'),
  DATABASE_URL: z.string().startsWith('postgres').optional(),
  DEMO: flag.default(true),
  DEMO_DAY: z.iso.date().optional(),
  SESSION_SECRET: z.string().min(32, 'at least 32 characters').optional(),
  SMTP_URL: z.string().startsWith('smtp').optional(),
  MAIL_FROM: z.string().min(3).default('Witness Mark <witness-mark@localhost>'),
  /** Set by npm: the folder in which the person stands. */
  INIT_CWD: z.string().optional(),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
});

export type Config = {
  environment: 'development' | 'production' | 'test';
  port: number;
  host: string;
  publicUrl: string;
  isHttps: boolean;
  trustProxy: string | number | undefined;
  dataDir: string;
  /** The migrator's; absent where the local cluster is used. */
  databaseUrl: string | undefined;
  demo: boolean;
  /** The day on which the demo shop's records end; today where absent. */
  demoDay: string | undefined;
  sessionSecret: string | undefined;
  /** Absent: mail goes to the local outbox. */
  smtpUrl: string | undefined;
  mailFrom: string;
  logLevel: string;
  /** What files named on the command line are relative to. */
  calledFrom: string;
};

/**
 * Reads the settings from the environment, the only place that does.
 * @throws Error with a line for every setting that cannot be used.
 */
export function readConfig(env: NodeJS.ProcessEnv = process.env): Config {
  const result = settings.safeParse(env);
  const problems = result.success
    ? result.data.NODE_ENV === 'production' && result.data.DATABASE_URL && !result.data.SESSION_SECRET
      ? ['SESSION_SECRET: must be set in production']
      : []
    : result.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
  if (!result.success || problems.length > 0) {
    throw new Error(`These settings cannot be used:\n  ${problems.join('\n  ')}`);
  }
  const values = result.data;
  const publicUrl = (values.PUBLIC_URL ?? `http://127.0.0.1:${values.PORT}`).replace(/\/+$/, '');
  return {
    environment: values.NODE_ENV,
    port: values.PORT,
    host: values.HOST,
    publicUrl,
    isHttps: publicUrl.startsWith('https:'),
    trustProxy: values.TRUST_PROXY,
    dataDir: path.resolve(values.DATA_DIR),
    databaseUrl: values.DATABASE_URL,
    demo: values.DEMO,
    demoDay: values.DEMO_DAY,
    sessionSecret: values.SESSION_SECRET,
    smtpUrl: values.SMTP_URL,
    mailFrom: values.MAIL_FROM,
    logLevel: values.LOG_LEVEL,
    calledFrom: values.INIT_CWD ?? process.cwd(),
  };
}
