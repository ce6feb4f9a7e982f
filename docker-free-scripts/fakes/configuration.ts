/**
 * What the stand-ins read from the environment. A key that looks real stops the process before it listens: a person
 * who pasted one should hear of it, and it must not reach this program's state file.
 */
export type Configuration = {
  port: number;
  smtpPort: number;
  /** Folder for state that survives a restart; null keeps everything in memory. */
  dataFolder: string | null;
  paymentKey: string;
  webhookSecret: string;
  webhookUrl: string;
  uploadKey: string;
  uploadAppId: string;
  /** How long a PUT waits for the application to take note of the file. */
  callbackLimitMs: number;
};

/** Reads a record of variables. Throws an Error that names the variable and what it should look like. */
export function readConfiguration(record: Readonly<Record<string, string | undefined>>): Configuration {
  const token = readUploadToken(required(record, 'UPLOADTHING_TOKEN', 'base64 of {"apiKey":"sk_fake_…","appId":"…"}'));
  const origin = record.NEXTAUTH_URL || 'http://localhost:3000';
  const webhookUrl = record.FAKES_WEBHOOK_URL || `${origin.replace(/\/$/, '')}/api/webhooks/stripe`;
  if (!isLoopbackAddress(webhookUrl))
    throw new Error(
      'FAKES_WEBHOOK_URL (or NEXTAUTH_URL) must be a loopback address such as http://localhost:3000/api/webhooks/stripe',
    );
  return {
    port: readNumber(record, 'FAKES_PORT', 4601, 65_535),
    smtpPort: readNumber(record, 'FAKES_SMTP_PORT', 4602, 65_535),
    dataFolder: record.FAKES_DATA || null,
    paymentKey: fakeKey('STRIPE_SECRET_KEY', required(record, 'STRIPE_SECRET_KEY', 'sk_test_fake_…'), 'sk_test_fake_'),
    webhookSecret: fakeKey(
      'STRIPE_WEBHOOK_SECRET',
      required(record, 'STRIPE_WEBHOOK_SECRET', 'whsec_fake_…'),
      'whsec_fake_',
    ),
    webhookUrl,
    uploadKey: fakeKey('UPLOADTHING_TOKEN (its apiKey)', token.apiKey, 'sk_fake_'),
    uploadAppId: token.appId,
    callbackLimitMs: readNumber(record, 'FAKES_CALLBACK_LIMIT_MS', 15_000, 120_000),
  };
}

const LOOPBACK_HOSTS = new Set(['localhost', '127.0.0.1', '[::1]']);

/** True for an http address of this machine: the only place the stand-ins ever send anything. */
export function isLoopbackAddress(address: string): boolean {
  if (!URL.canParse(address)) return false;
  const url = new URL(address);
  return url.protocol === 'http:' && LOOPBACK_HOSTS.has(url.hostname);
}

function required(record: Readonly<Record<string, string | undefined>>, name: string, like: string): string {
  const text = record[name];
  if (!text) throw new Error(`${name} is not set: expected ${like}`);
  return text;
}

function fakeKey(name: string, key: string, prefix: string): string {
  // The value is never repeated: if it is a real key, it should not be in a log as well.
  if (!key.startsWith(prefix)) throw new Error(`${name} does not start with ${prefix}: the stand-ins refuse real keys`);
  return key;
}

function readNumber(
  record: Readonly<Record<string, string | undefined>>,
  name: string,
  fallback: number,
  most: number,
): number {
  const text = record[name];
  if (!text) return fallback;
  const value = Number(text);
  if (!Number.isInteger(value) || value < 1 || value > most)
    throw new Error(`${name} must be a whole number from 1 to ${most}`);
  return value;
}

function readUploadToken(text: string): { apiKey: string; appId: string } {
  const failure = new Error(
    'UPLOADTHING_TOKEN is not base64 of {"apiKey":"sk_fake_…","appId":"…","regions":["local"]}',
  );
  let value: unknown;
  try {
    value = JSON.parse(Buffer.from(text, 'base64').toString('utf8'));
  } catch {
    throw failure;
  }
  if (typeof value !== 'object' || value === null || !('apiKey' in value) || !('appId' in value)) throw failure;
  const { apiKey, appId } = value;
  if (typeof apiKey !== 'string' || typeof appId !== 'string') throw failure;
  return { apiKey, appId };
}
