/**
 * The local stand-ins in one process: HTTP (payments, upload store, pages, controls) and SMTP, on 127.0.0.1 only.
 *   node --env-file=.env.local --import tsx docker-free-scripts/fakes/main.ts
 */
import { type IncomingMessage, createServer } from 'node:http';
import { checkoutPage } from './checkout-page';
import { isLoopbackAddress, readConfiguration } from './configuration';
import { controls } from './controls';
import { type Answer, BadRequest, type Call, Interrupted, TooLarge, callFrom, drained, json, send, text } from './http';
import { Mailbox, type StoredMail } from './mailbox';
import { filePage, pages } from './pages';
import { type PaymentState, emptyPayments } from './payment-records';
import { PaymentRefusal, PaymentRules } from './payment-rules';
import { Payments, type Remembered, paymentTrouble } from './payments';
import { Storage } from './storage';
import { type Service, Troubles, delay } from './trouble';
import { uploadTrouble } from './upload-cors';
import { emptyUploads } from './upload-state';
import { Uploads } from './uploads';
import { type Delivery, Webhooks } from './webhooks';

/** The connection is to be cut, as ordered. */
class Dropped extends Error {}

const RESET_LIMIT_MS = 12_000;

const configuration = configurationOrExit();
const storage = new Storage(configuration.dataFolder);
const changed = (): void => storage.changed();
const troubles = new Troubles();
const paymentState: PaymentState = storage.keep('payments', emptyPayments(), () => paymentState);
const webhooks: Webhooks = new Webhooks(
  {
    url: configuration.webhookUrl,
    secret: configuration.webhookSecret,
    findEvent: (id) => paymentState.events[id] ?? null,
    changed,
  },
  storage.keep<Delivery[]>('deliveries', [], () => webhooks.list()),
);
const rules = new PaymentRules(paymentState, (event) => webhooks.announce(event));
const payments: Payments = new Payments(
  configuration,
  rules,
  storage.keep<Record<string, Remembered>>('idempotencyKeys', {}, () => payments.savedKeys()),
  changed,
);
const uploads: Uploads = new Uploads(
  configuration,
  storage,
  storage.keep('uploads', emptyUploads(), () => uploads.state),
);
const mailbox: Mailbox = new Mailbox(
  storage,
  troubles,
  storage.keep<StoredMail[]>('mails', [], () => mailbox.mails),
);
const shown = { rules, webhooks, mailbox, uploads, troubles };

const server = createServer((request, response) => {
  void answer(callFrom(request))
    .catch((error: unknown) => failure(request, error))
    .then(async (given) => {
      if (given === null) {
        request.socket.destroy();
        return;
      }
      await drained(request);
      send(response, given);
    });
});

await mailbox.listen(configuration.smtpPort);
await new Promise<void>((resolve, reject) => {
  server.once('error', reject);
  server.listen(configuration.port, '127.0.0.1', () => resolve());
});
webhooks.resume();
process.stdout.write(
  `stand-ins ready: http://localhost:${configuration.port}/ and smtp://127.0.0.1:${configuration.smtpPort}\n`,
);
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, stop);

function configurationOrExit(): ReturnType<typeof readConfiguration> {
  try {
    return readConfiguration(process.env);
  } catch (error) {
    process.stderr.write(`stand-ins: ${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  }
}

async function answer(call: Call): Promise<Answer> {
  // A page on another name that resolves to this machine, or on another site, has no business here.
  if (!isLoopbackAddress(`http://${call.host}`)) return text(421, 'The stand-ins answer to localhost only.');
  const origin = call.headers.origin;
  if (origin !== undefined && origin !== 'null' && !isLoopbackAddress(origin))
    return text(403, 'The stand-ins answer to pages of this machine only.');

  if (call.path.startsWith('/v1/')) {
    return troubled('payments', call, (trouble) => payments.handle(call, trouble), paymentTrouble);
  }
  if (/^\/(?:ingest|files-api|a)\//.test(call.path)) {
    return troubled(
      'uploads',
      call,
      async (trouble) => (await trouble()) ?? uploads.handle(call),
      (status) => uploadTrouble(call, status),
    );
  }
  if (call.path.startsWith('/__/')) return controls(call, { ...shown, reset, changed });
  if (call.path.startsWith('/checkout/')) return checkoutPage(call, rules, changed);
  const shownPage = filePage(call, uploads) ?? (await pages(call, shown));
  return shownPage ?? text(404, 'No such page.');
}

/** Does the work with the trouble that was ordered for it: delay, then refusal or cut, then the work, then perhaps a cut. */
async function troubled(
  service: Service,
  call: Call,
  work: (trouble: () => Promise<Answer | null>) => Promise<Answer>,
  refuse: (status: number) => Answer,
): Promise<Answer> {
  // Asking beforehand is not the work, so it is not troubled.
  const ordered = call.method === 'OPTIONS' ? null : troubles.take(service, `${call.method} ${call.path}`);
  const answered = await work(async () => {
    if (!ordered) return null;
    if (ordered.delayMs > 0) await delay(ordered.delayMs);
    if (ordered.drop === 'before') throw new Dropped();
    return ordered.status === null ? null : refuse(ordered.status);
  });
  if (ordered?.drop === 'after') throw new Dropped();
  return answered;
}

/** What is answered to an error; null cuts the connection. */
function failure(request: IncomingMessage, error: unknown): Answer | null {
  if (error instanceof Dropped || error instanceof Interrupted) return null;
  if (error instanceof BadRequest) return json(400, { error: error.message });
  if (error instanceof PaymentRefusal) return json(error.status, { error: error.message });
  if (error instanceof TooLarge) return json(413, { error: error.message });
  process.stderr.write(
    `stand-ins: ${request.method ?? ''} ${(request.url ?? '').split('?')[0] ?? ''}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`,
  );
  return json(500, { error: 'the stand-in failed; see its log' });
}

async function reset(): Promise<void> {
  troubles.clear();
  webhooks.clear();
  // A message on its way would otherwise arrive in what comes after.
  await webhooks.settled(RESET_LIMIT_MS);
  Object.assign(paymentState, emptyPayments());
  payments.forgetKeys();
  uploads.clear();
  mailbox.clear();
  changed();
}

function stop(): void {
  storage.save();
  mailbox.close();
  server.close();
  server.closeAllConnections();
  // Retries still waiting are taken up by the next process, if there is a folder for them.
  process.exit(0);
}
