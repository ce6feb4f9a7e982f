/**
 * write-environment.ts [--new] FILE: makes the environment file for local work, with random secrets and the local fakes,
 * or brings an existing one up to date: addresses follow PORT, everything else in it stays as it is. --new starts afresh.
 * Reads PORT and OWN_DATABASE_URL. Prints the file's variables as `export` lines for a shell.
 */
import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { parseEnv } from 'node:util';
import { z } from 'zod';

const given = z
  .object({ PORT: z.coerce.number().int().min(1).max(65_000), OWN_DATABASE_URL: z.string().startsWith('postgres://') })
  .parse(process.env);
const isNew = process.argv[2] === '--new';
const file = process.argv[isNew ? 3 : 2];
if (!file) throw new Error('usage: write-environment.ts [--new] FILE');

type Values = Record<string, string | undefined>;

const randomHex = (bytes: number) => randomBytes(bytes).toString('hex');

/** Made once and kept. Every fake key carries the prefix that the fakes and lib/services/environment.ts insist on. */
function secrets(): Values {
  const token = {
    apiKey: `sk_fake_${randomHex(16)}`,
    appId: 'ohmsteadlocal',
    regions: ['local'],
    ingestHost: 'ingest.invalid',
  };
  return {
    OHMSTEAD_SERVICES: 'fake',
    NEXTAUTH_SECRET: randomHex(33),
    STRIPE_SECRET_KEY: `sk_test_fake_${randomHex(16)}`,
    STRIPE_WEBHOOK_SECRET: `whsec_fake_${randomHex(16)}`,
    UPLOADTHING_TOKEN: Buffer.from(JSON.stringify(token)).toString('base64'),
    UPLOADTHING_IS_DEV: 'false',
    UPLOADTHING_LOG_LEVEL: 'Warning',
    MAIL_FROM: 'Ohmstead <stores@ohmstead.example>',
    LOG_LEVEL: 'info',
  };
}

/** One origin throughout: to a browser, localhost and 127.0.0.1 are two. Only the store's own host must be "localhost". */
function addresses(port: number): Values {
  const web = `http://127.0.0.1:${port}`;
  const fakes = `http://127.0.0.1:${port + 1}`;
  return {
    NEXTAUTH_URL: web,
    STRIPE_API_URL: fakes,
    UPLOADTHING_CALLBACK_URL: `${web}/api/uploadthing`,
    UPLOADTHING_INGEST_URL: `${fakes}/ingest`,
    UPLOADTHING_API_URL: `${fakes}/files-api`,
    UPLOADTHING_UFS_HOST: `localhost:${port + 1}`,
    UPLOADTHING_UFS_APP_ID_LOCATION: 'path',
    SMTP_URL: `smtp://127.0.0.1:${port + 2}?connectionTimeout=3000`,
    FAKES_PORT: String(port + 1),
    FAKES_SMTP_PORT: String(port + 2),
  };
}

const HEAD = `# Written by docker-free-scripts/start.sh for work on this machine; .env.example says what each variable means.
# Secrets are random and kept; addresses follow PORT at each start; what you add stays.
`;

function withValues(text: string, values: Values): string {
  let result = text;
  for (const [key, value] of Object.entries(values)) {
    const line = `${key}=${value}`;
    const present = new RegExp(`^${key}=.*$`, 'm');
    result = present.test(result) ? result.replace(present, () => line) : `${result.replace(/\n?$/, '\n')}${line}\n`;
  }
  return result;
}

const before = !isNew && existsSync(file) ? readFileSync(file, 'utf8') : HEAD;
const own: Values = { PORT: String(given.PORT), DATABASE_URL: given.OWN_DATABASE_URL };
const known = parseEnv(before);
const missingSecrets = Object.fromEntries(Object.entries(secrets()).filter(([key]) => known[key] === undefined));
// Someone who set the file to the hosted services wrote their own addresses.
const isFake = (known.OHMSTEAD_SERVICES ?? 'fake') === 'fake';
const after = withValues(before, isFake ? { ...own, ...missingSecrets, ...addresses(given.PORT) } : own);
writeFileSync(file, after, { mode: 0o600 });

for (const [key, value] of Object.entries(parseEnv(after))) {
  if (/^[A-Za-z_]\w*$/.test(key)) console.log(`export ${key}='${(value ?? '').replaceAll("'", "'\\''")}'`);
}
