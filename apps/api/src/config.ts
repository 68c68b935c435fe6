import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { generateKeyPairSync } from 'node:crypto';
import { dirname, join, resolve } from 'node:path';
import { z } from 'zod';

const flag = z
  .enum(['0', '1', 'true', 'false'])
  .default('0')
  .transform((text) => text === '1' || text === 'true');

const port = z.coerce.number().int().min(0).max(65_535);

export const environment = z.object({
  NODE_ENV: z.string().default('development'),
  TRAMMEL_DEMO: flag,
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: port.default(4180),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
  DATA_DIR: z.string().min(1).default('data'),
  PORTAL_DIR: z.string().min(1).default('dist/portal'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().min(1).default('us-east-1'),
  S3_BUCKET: z.string().min(3).default('trammel'),
  S3_ACCESS_KEY_ID: z.string().min(1).optional(),
  S3_SECRET_ACCESS_KEY: z.string().min(1).optional(),
  SMTP_HOST: z.string().min(1).default('127.0.0.1'),
  SMTP_PORT: port.default(4182),
  SMTP_SECURE: flag,
  SMTP_USER: z.string().min(1).optional(),
  SMTP_PASSWORD: z.string().min(1).optional(),
  MAIL_FROM: z.string().min(3).default('Trammel <trammel@localhost>'),
  JWT_SECRET: z.string().optional(),
  AUDIT_KEY: z.string().optional(),
  SIGNING_KEY: z.string().optional(),
});

/** Everything the process is told from outside, read once. */
export interface Config {
  readonly production: boolean;
  readonly demo: boolean;
  readonly host: string;
  readonly port: number;
  /** Origin that links in mail and the origin check use; never taken from a request. */
  readonly publicUrl: string;
  readonly trustedProxies: number;
  readonly dataDir: string;
  readonly databaseFile: string;
  readonly portalDir: string;
  readonly logLevel: string;
  readonly s3: {
    readonly endpoint: string | undefined;
    readonly region: string;
    readonly bucket: string;
    readonly accessKeyId: string;
    readonly secretAccessKey: string;
  };
  readonly smtp: {
    readonly host: string;
    readonly port: number;
    readonly secure: boolean;
    readonly user: string | undefined;
    readonly password: string | undefined;
    readonly from: string;
  };
  /** 32 bytes or more each; the signing key is an Ed25519 private key in PEM. */
  readonly secrets: { readonly session: Buffer; readonly audit: Buffer; readonly signingKeyPem: string };
}

/** Of every invented person of the demonstration, which never runs in production. */
export const demoPassword = 'brass scribes on blue layout';

export class ConfigError extends Error {}

/** Reads the environment. Throws `ConfigError` with every fault named, so that a start fails loudly and whole. */
export function readConfig(env: NodeJS.ProcessEnv): Config {
  const parsed = environment.safeParse(withoutBlanks(env));
  if (!parsed.success)
    throw new ConfigError(`The environment is not usable:\n${z.prettifyError(parsed.error)}`);
  const e = parsed.data;
  const production = e.NODE_ENV === 'production';
  if (production && e.TRAMMEL_DEMO) {
    throw new ConfigError('TRAMMEL_DEMO is for trying the product: it never runs with NODE_ENV=production.');
  }
  if (production && !e.PUBLIC_URL) throw new ConfigError('PUBLIC_URL must be set with NODE_ENV=production.');
  const dataDir = resolve(e.DATA_DIR);
  const secret = (name: 'JWT_SECRET' | 'AUDIT_KEY', file: string) =>
    secretBytes(name, e[name], production ? undefined : join(dataDir, 'keys', file));
  return {
    production,
    demo: e.TRAMMEL_DEMO,
    host: e.HOST,
    port: e.PORT,
    publicUrl: new URL(e.PUBLIC_URL ?? `http://${e.HOST}:${e.PORT}`).origin,
    trustedProxies: e.TRUSTED_PROXIES,
    dataDir,
    databaseFile: join(dataDir, 'trammel.sqlite'),
    portalDir: resolve(e.PORTAL_DIR),
    logLevel: e.LOG_LEVEL,
    s3: {
      endpoint: e.S3_ENDPOINT,
      region: e.S3_REGION,
      bucket: e.S3_BUCKET,
      ...storeCredentials(production, e.S3_ACCESS_KEY_ID, e.S3_SECRET_ACCESS_KEY),
    },
    smtp: {
      host: e.SMTP_HOST,
      port: e.SMTP_PORT,
      secure: e.SMTP_SECURE,
      user: e.SMTP_USER,
      password: e.SMTP_PASSWORD,
      from: e.MAIL_FROM,
    },
    secrets: {
      session: secret('JWT_SECRET', 'session.key'),
      audit: secret('AUDIT_KEY', 'audit.key'),
      signingKeyPem: signingKey(e.SIGNING_KEY, production ? undefined : join(dataDir, 'keys', 'signing.pem')),
    },
  };
}

function withoutBlanks(env: NodeJS.ProcessEnv): NodeJS.ProcessEnv {
  return Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''));
}

function storeCredentials(production: boolean, id: string | undefined, key: string | undefined) {
  if (production && (!id || !key || id === 'S3RVER')) {
    throw new ConfigError(
      'S3_ACCESS_KEY_ID and S3_SECRET_ACCESS_KEY must be set, and not to the ones of the trial store.',
    );
  }
  return { accessKeyId: id ?? 'S3RVER', secretAccessKey: key ?? 'S3RVER' };
}

function secretBytes(name: string, given: string | undefined, file: string | undefined): Buffer {
  if (given !== undefined) return longEnough(name, Buffer.from(given, 'base64'));
  if (!file) throw new ConfigError(`${name} must be set: 32 random bytes or more, in base64.`);
  return Buffer.from(
    keptInFile(file, () => randomBytes(32).toString('base64')),
    'base64',
  );
}

function longEnough(name: string, bytes: Buffer): Buffer {
  if (bytes.length < 32)
    throw new ConfigError(`${name} is too short: it takes 32 random bytes or more, in base64.`);
  return bytes;
}

function signingKey(given: string | undefined, file: string | undefined): string {
  if (given !== undefined)
    return given.includes('BEGIN') ? given : Buffer.from(given, 'base64').toString('utf8');
  if (!file) throw new ConfigError('SIGNING_KEY must be set: an Ed25519 private key, PEM or base64 of PEM.');
  return keptInFile(file, () =>
    generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }).toString(),
  );
}

/** Outside production a secret that was not given is made once and kept, so that a second start still knows it. */
function keptInFile(file: string, make: () => string): string {
  if (!existsSync(file)) {
    mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
    writeFileSync(file, make(), { mode: 0o600, flag: 'wx' });
  }
  return readFileSync(file, 'utf8');
}
