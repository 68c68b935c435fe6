import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { z } from 'zod';
import { environment, readConfig } from '../apps/api/src/config.ts';
import { root } from './rooms.mjs';

const text = readFileSync(join(root, 'docker-compose.yml'), 'utf8');
const health = z.object({
  test: z.array(z.string()).min(2),
  interval: z.string(),
  timeout: z.string(),
  retries: z.number(),
  start_period: z.string().optional(),
});
const service = z.strictObject({
  image: z
    .string()
    .regex(/:(?!latest)[\w.-]+$/, 'an image is pinned to a version')
    .optional(),
  build: z.strictObject({ context: z.string(), dockerfile_inline: z.string() }).optional(),
  command: z.string().optional(),
  environment: z.record(z.string(), z.string()).default({}),
  ports: z
    .array(z.string().regex(/^127\.0\.0\.1:\d+:\d+$/, 'a port is published to this machine only'))
    .default([]),
  volumes: z.array(z.string()).default([]),
  depends_on: z.record(z.string(), z.strictObject({ condition: z.literal('service_healthy') })).default({}),
  healthcheck: health,
  stop_grace_period: z.string().optional(),
  restart: z.literal('unless-stopped'),
  security_opt: z.array(z.string()).default([]),
  cap_drop: z.array(z.string()).default([]),
});
const compose = z
  .strictObject({
    name: z.literal('trammel'),
    services: z.strictObject({ product: service, store: service, mail: service }),
    volumes: z.record(z.string(), z.null()),
  })
  .parse(parse(text));
const { product, store, mail } = compose.services;

const secret = /SECRET|KEY|PASSWORD|TOKEN|ROOT_USER/;
const secrets: Record<string, string> = {
  S3_ACCESS_KEY_ID: 'access',
  S3_SECRET_ACCESS_KEY: 'secret-of-the-store',
  JWT_SECRET: randomBytes(32).toString('base64'),
  AUDIT_KEY: randomBytes(32).toString('base64'),
  SIGNING_KEY: Buffer.from(
    generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }).toString(),
  ).toString('base64'),
};

/** As compose does it: `${NAME:-default}` and `${NAME:?message}`. */
const filled = (value: string) =>
  value.replace(/\$\{(\w+):([-?])([^}]*)\}/g, (_whole, name: string, kind: string, rest: string) => {
    const given = secrets[name] ?? (kind === '-' ? rest : undefined);
    if (given === undefined) throw new Error(`${name} is asked for and not among the secrets`);
    return given;
  });

const dotenv = Object.fromEntries(
  readFileSync(join(root, '.env.example'), 'utf8')
    .split('\n')
    .filter((line) => line && !line.startsWith('#'))
    .map((line) => [line.slice(0, line.indexOf('=')), line.slice(line.indexOf('=') + 1)]),
);

describe('docker-compose.yml', () => {
  it('gives the product only names it reads, and all it needs in production', () => {
    const known = Object.keys(environment.shape);
    expect(Object.keys(product.environment).filter((name) => !known.includes(name))).toEqual([]);
    const env = Object.fromEntries(
      Object.entries(product.environment).map(([name, value]) => [name, filled(value)]),
    );
    const config = readConfig(env);
    expect(config).toMatchObject({
      production: true,
      demo: false,
      host: '0.0.0.0',
      port: 4180,
      dataDir: '/data',
    });
    expect(config.s3).toMatchObject({ accessKeyId: 'access', secretAccessKey: 'secret-of-the-store' });
  });

  it('lets the three find one another', () => {
    expect(product.environment.S3_ENDPOINT).toBe('http://store:9000');
    expect(store.environment.MINIO_ROOT_USER).toBe(product.environment.S3_ACCESS_KEY_ID);
    expect(store.environment.MINIO_ROOT_PASSWORD).toBe(product.environment.S3_SECRET_ACCESS_KEY);
    expect(product.environment.SMTP_HOST).toBe('mail');
    expect(Object.keys(product.depends_on).sort()).toEqual(['mail', 'store']);
    expect(product.ports).toEqual([`127.0.0.1:4180:${product.environment.PORT}`]);
    expect(store.ports).toEqual([]);
    expect(mail.ports).toHaveLength(1);
    expect(product.healthcheck.test.join(' ')).toContain(
      `127.0.0.1:${product.environment.PORT}/health/ready`,
    );
  });

  it('keeps data in declared volumes', () => {
    const used = [product, store, mail].flatMap((each) => each.volumes.map((volume) => volume.split(':')[0]));
    expect(used.sort()).toEqual(Object.keys(compose.volumes).sort());
    expect(product.volumes).toEqual([`product-data:${product.environment.DATA_DIR}`]);
  });

  it('holds no secret: each must be given', () => {
    const values = [product, store, mail].flatMap((each) => Object.entries(each.environment));
    const held = values.filter(([name, value]) => secret.test(name) && !/^\$\{\w+:\?[^}]+\}$/.test(value));
    expect(held).toEqual([]);
    expect(values.filter(([name]) => secret.test(name))).not.toHaveLength(0);
  });

  it('copies everything the build reads', () => {
    const dockerfile = product.build?.dockerfile_inline ?? '';
    const copied = [...dockerfile.matchAll(/^COPY (.+) \S+$/gm)].flatMap(([, names]) =>
      (names ?? '').split(' '),
    );
    const build = readFileSync(join(root, '.ci/build.mjs'), 'utf8');
    const inputs = [...build.matchAll(/'([\w.-]+\.(?:json|ts|html))'/g)].map(([, name]) => name);
    expect(inputs.length).toBeGreaterThan(4);
    expect(copied).toEqual(expect.arrayContaining([...inputs, '.npmrc', '.ci', 'apps', 'packages']));
    expect(dockerfile).toContain('USER node');
  });
});

describe('.env.example', () => {
  it('names every setting once and no other', () => {
    expect(Object.keys(dotenv).sort()).toEqual(Object.keys(environment.shape).sort());
  });

  it('holds no secret', () => {
    expect(Object.entries(dotenv).filter(([name, value]) => secret.test(name) && value !== '')).toEqual([]);
  });

  it('is a whole configuration once its secrets are filled in', () => {
    expect(readConfig({ ...dotenv, ...secrets }).publicUrl).toBe('https://trammel.example.com');
  });
});
