import { join, resolve } from 'node:path';

import { z } from 'zod';

/** Secrets of a demo on one's own machine; refused in production. */
const demoSecret = 'demo-only-not-a-secret-demo-only-not-a-secret';

const flag = z.enum(['0', '1', 'true', 'false']).transform((value) => value === '1' || value === 'true');

const environmentSchema = z.object({
  NODE_ENV: z.string().default('development'),
  EBBLINE_MODE: z.enum(['demo', 'production']).default('demo'),
  PORT: z.coerce.number().int().min(0).max(65535).default(8080),
  HOST: z.string().default('localhost'),
  EBBLINE_DATA_DIR: z.string().default('.data'),
  EBBLINE_PUBLIC_URL: z.url().optional(),
  EBBLINE_SECRET: z.string().min(32).default(demoSecret),
  EBBLINE_SAMPLE_SEED: z.string().min(16).optional(),
  EBBLINE_BCRYPT_COST: z.coerce.number().int().min(4).max(16).default(12),
  EBBLINE_SECURE_COOKIES: flag.optional(),
  EBBLINE_TRUST_PROXY: z.coerce.number().int().min(0).max(10).default(0),
  EBBLINE_SMTP_URL: z.string().optional(),
  EBBLINE_MAIL_FROM: z.string().default('Ebbline <no-reply@ebbline.invalid>'),
  EBBLINE_S3_BUCKET: z.string().min(1).optional(),
  EBBLINE_S3_ENDPOINT: z.url().optional(),
  EBBLINE_S3_REGION: z.string().min(1).default('us-east-1'),
  EBBLINE_DEV_ORIGIN: z.string().optional(),
  EBBLINE_SECOND_FACTOR: z.enum(['required', 'optional']).optional(),
  EBBLINE_RATE_LIMITS: z.enum(['on', 'off']).default('on'),
  EBBLINE_LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info'),
});

export interface Config {
  isProduction: boolean;
  /** Demo data, demo accounts and the outbox page are there. */
  isDemo: boolean;
  port: number;
  host: string;
  dataDir: string;
  databaseFile: string;
  uploadsDir: string;
  backupsDir: string;
  /** Undefined: uploaded files stay in the folder. */
  bucket: { bucket: string; endpoint: string | undefined; region: string } | undefined;
  webDir: string;
  publicUrl: string;
  /** Signs access tokens and CSRF tokens. */
  secret: string;
  /** Draws the decisions that get a second, blind look; unknown to moderators. */
  sampleSeed: string;
  bcryptCost: number;
  hasSecureCookies: boolean;
  trustProxy: number;
  /** Undefined: mail stays in the local outbox. */
  smtpUrl: string | undefined;
  mailFrom: string;
  /** Where Metro serves the app while developing; the only origin CORS lets in. */
  devOrigin: string | undefined;
  hasRateLimits: boolean;
  /** Moderators and stewards may act only once their sign-in asks for a code. */
  requiresSecondFactor: boolean;
  logLevel: string;
}

/** The only reader of the environment. Throws a readable Error when the settings can't be run with. */
export function readConfig(environment: NodeJS.ProcessEnv = process.env): Config {
  const parsed = environmentSchema.safeParse(environment);
  if (!parsed.success) {
    const lines = parsed.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`);
    throw new Error(`The settings in the environment can't be used:\n${lines.join('\n')}`);
  }
  const settings = parsed.data;
  const isProduction = settings.EBBLINE_MODE === 'production';
  if (isProduction && settings.EBBLINE_SECRET === demoSecret)
    throw new Error(
      'Set EBBLINE_SECRET to a random text of at least 32 characters before starting in production.',
    );
  if (isProduction && !settings.EBBLINE_PUBLIC_URL)
    throw new Error('Set EBBLINE_PUBLIC_URL to the address people reach the exchange at.');
  if (settings.EBBLINE_S3_ENDPOINT && !settings.EBBLINE_S3_BUCKET)
    throw new Error(
      'Set EBBLINE_S3_BUCKET too: EBBLINE_S3_ENDPOINT alone does not say where files are kept.',
    );
  const dataDir = resolve(settings.EBBLINE_DATA_DIR);
  return {
    isProduction,
    isDemo: !isProduction,
    port: settings.PORT,
    host: settings.HOST,
    dataDir,
    databaseFile: join(dataDir, 'ebbline.sqlite'),
    uploadsDir: join(dataDir, 'uploads'),
    backupsDir: join(dataDir, 'backups'),
    bucket: settings.EBBLINE_S3_BUCKET
      ? {
          bucket: settings.EBBLINE_S3_BUCKET,
          endpoint: settings.EBBLINE_S3_ENDPOINT,
          region: settings.EBBLINE_S3_REGION,
        }
      : undefined,
    webDir: resolve('dist/web'),
    publicUrl: settings.EBBLINE_PUBLIC_URL ?? `http://localhost:${settings.PORT}`,
    secret: settings.EBBLINE_SECRET,
    sampleSeed: settings.EBBLINE_SAMPLE_SEED ?? settings.EBBLINE_SECRET,
    bcryptCost:
      settings.NODE_ENV === 'test'
        ? settings.EBBLINE_BCRYPT_COST
        : Math.max(12, settings.EBBLINE_BCRYPT_COST),
    hasSecureCookies: settings.EBBLINE_SECURE_COOKIES ?? isProduction,
    trustProxy: settings.EBBLINE_TRUST_PROXY,
    smtpUrl: settings.EBBLINE_SMTP_URL,
    mailFrom: settings.EBBLINE_MAIL_FROM,
    devOrigin: isProduction ? undefined : settings.EBBLINE_DEV_ORIGIN,
    requiresSecondFactor:
      (settings.EBBLINE_SECOND_FACTOR ?? (isProduction ? 'required' : 'optional')) === 'required',
    hasRateLimits: settings.EBBLINE_RATE_LIMITS === 'on',
    logLevel: settings.EBBLINE_LOG_LEVEL,
  };
}
