/** What tests (and curious people) can do to the stand-ins: /__/…, all JSON. README.md in this folder lists it. */
import { type Answer, BadRequest, type Call, isRecord, json, jsonBody } from './http';
import type { Shown } from './pages';
import { whole } from './trouble';
import { FORGERIES } from './webhooks';

const MOST_WAIT_MS = 60_000;
const MOST_TIMES = 100;

export type Controlled = Shown & { reset: () => Promise<void>; changed: () => void };

/** Answers a control. Throws BadRequest for an order that makes no sense. */
export async function controls(call: Call, held: Controlled): Promise<Answer> {
  const name = `${call.method} ${call.path.slice('/__/'.length)}`;
  const given = call.method === 'POST' ? await jsonBody(call) : {};
  const { rules, webhooks, uploads, troubles } = held;
  switch (name) {
    case 'GET health':
      return json(200, { ok: true });
    case 'POST reset':
      await held.reset();
      return json(200, { ok: true });
    case 'POST next':
      return json(200, troubles.order(given));
    case 'GET next':
      return json(200, troubles.list());
    case 'GET webhooks':
      return json(200, webhooks.list());
    case 'GET settled':
      return json(200, {
        settled: await webhooks.settled(Math.min(MOST_WAIT_MS, Number(call.query.get('limitMs')) || 10_000)),
      });
    case 'POST webhooks/hold':
      webhooks.hold();
      return json(200, { ok: true });
    case 'POST webhooks/release':
      return json(200, { sent: webhooks.release(given.order) });
    case 'POST webhooks/lose':
      webhooks.loseNext(whole(given.times, 'times', 1, 1, MOST_TIMES));
      return json(200, { ok: true });
    case 'POST webhooks/duplicate':
      webhooks.duplicate(wordOf(given, 'event'), whole(given.times, 'times', 1, 1, MOST_TIMES));
      return json(200, { ok: true });
    case 'POST webhooks/forge':
      return json(200, await forge(given, held));
    case 'POST payments/pay': {
      const outcome = rules.payWithCard(
        wordOf(given, 'session'),
        typeof given.card === 'string' ? given.card : '4242424242424242',
      );
      held.changed();
      return json(200, outcome);
    }
    case 'POST payments/expire': {
      const session = rules.expireSession(wordOf(given, 'session'), { requestId: null, idempotencyKey: null });
      held.changed();
      return json(200, { id: session.id, status: session.status });
    }
    case 'GET payments':
      return json(200, rules.state);
    case 'GET uploads':
      return json(200, Object.values(uploads.state.files));
    case 'POST uploads/lose-callback':
      uploads.loseNextCallbacks(whole(given.times, 'times', 1, 1, MOST_TIMES));
      return json(200, { ok: true });
    case 'POST uploads/call-again':
      return json(200, await uploads.callBackAgain(wordOf(given, 'key')));
    case 'POST uploads/forge-callback':
      return json(200, await uploads.forgeCallback(wordOf(given, 'key')));
    default:
      return json(404, { error: `no control ${name}; see docker-free-scripts/fakes/README.md` });
  }
}

async function forge(given: Record<string, unknown>, { rules, webhooks }: Controlled): Promise<unknown> {
  const how = FORGERIES.find((each) => each === (given.how ?? 'wrong-secret'));
  if (!how) throw new BadRequest(`how must be one of ${FORGERIES.join(', ')}`);
  if (typeof given.event === 'string') return webhooks.forge(rules.getEvent(given.event), how);
  const object = isRecord(given.object) ? given.object : {};
  return webhooks.forge(rules.inventEvent(wordOf(given, 'type'), object), how);
}

function wordOf(given: Record<string, unknown>, name: string): string {
  const value = given[name];
  if (typeof value !== 'string' || value === '') throw new BadRequest(`${name} must be text`);
  return value;
}
