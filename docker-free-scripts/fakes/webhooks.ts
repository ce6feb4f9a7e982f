/**
 * Sends payment events to the application, signed as the provider signs them, and tries again for a while when they are
 * not taken. Tests hold, reorder, lose, duplicate and forge them here.
 */
import { createHmac } from 'node:crypto';
import type { PaymentEvent } from './payment-records';
import { BadRequest } from './http';

export type Delivery = {
  eventId: string;
  type: string;
  state: 'held' | 'waiting' | 'taken' | 'lost' | 'given-up';
  attempts: { atMs: number; outcome: string }[];
};

export type Forgery = 'wrong-secret' | 'empty-signature' | 'no-header' | 'stale' | 'future' | 'changed-body';
export const FORGERIES: readonly Forgery[] = [
  'wrong-secret',
  'empty-signature',
  'no-header',
  'stale',
  'future',
  'changed-body',
];

// The provider goes on for days; a minute is enough for an application that restarts on the same machine.
const RETRY_DELAYS_MS = [200, 400, 800, 1_600, 3_200, 6_400, 12_800, 25_600];
const ANSWER_LIMIT_MS = 10_000;
const MOST_DELIVERIES = 2_000;

type Sender = {
  url: string;
  secret: string;
  findEvent: (id: string) => PaymentEvent | null;
  changed: () => void;
};

export class Webhooks {
  private deliveries: Delivery[];
  private readonly sender: Sender;
  private queue: Delivery[] = [];
  private readonly retries = new Map<NodeJS.Timeout, Delivery>();
  private sending = false;
  private holding = false;
  private toLose = 0;
  private watchers: (() => void)[] = [];

  constructor(sender: Sender, saved: Delivery[]) {
    this.sender = sender;
    this.deliveries = saved;
  }

  /** Takes up what an earlier process left unsent. */
  resume(): void {
    for (const delivery of this.deliveries) {
      if (delivery.state === 'waiting' || delivery.state === 'held') {
        delivery.state = 'waiting';
        this.queue.push(delivery);
      }
    }
    this.pump();
  }

  list(): Delivery[] {
    return this.deliveries;
  }

  announce(event: PaymentEvent): void {
    const delivery: Delivery = { eventId: event.id, type: event.type, state: 'waiting', attempts: [] };
    this.deliveries = [...this.deliveries.slice(1 - MOST_DELIVERIES), delivery];
    if (this.toLose > 0) {
      this.toLose -= 1;
      delivery.state = 'lost';
    } else if (this.holding) delivery.state = 'held';
    else this.queue.push(delivery);
    this.sender.changed();
    this.pump();
  }

  hold(): void {
    this.holding = true;
  }

  /** Lets held events go, in the order given by `order` or by their ids, and holds no more. Returns the event ids in the order sent. */
  release(order: unknown): string[] {
    this.holding = false;
    const held = this.deliveries.filter((delivery) => delivery.state === 'held');
    const going = orderOf(held, order);
    for (const delivery of going) {
      delivery.state = 'waiting';
      this.queue.push(delivery);
    }
    this.pump();
    return going.map((delivery) => delivery.eventId);
  }

  /** The next events are never sent, as when the provider gives up. */
  loseNext(count: number): void {
    this.toLose += count;
  }

  /** Sends an event again as a new delivery. */
  duplicate(eventId: string, times: number): void {
    const event = this.sender.findEvent(eventId);
    if (!event) throw new BadRequest(`no event ${eventId}`);
    for (let n = 0; n < times; n += 1) this.announce(event);
  }

  /** Sends a message that must not be believed, once, and tells what the application answered. */
  async forge(event: PaymentEvent, how: Forgery): Promise<{ status: number | null; answer: string }> {
    const body = JSON.stringify(event);
    const seconds = Math.floor(Date.now() / 1000) + (how === 'stale' ? -600 : how === 'future' ? 600 : 0);
    const secret = how === 'wrong-secret' ? 'whsec_fake_somebodyelses' : this.sender.secret;
    const signature =
      how === 'no-header' ? null : how === 'empty-signature' ? `t=${seconds},v1=` : signatureOf(body, secret, seconds);
    try {
      const response = await this.post(
        how === 'changed-body' ? body.replace('"livemode":false', '"livemode": false') : body,
        signature,
      );
      return { status: response.status, answer: (await response.text()).slice(0, 2_000) };
    } catch (error) {
      return { status: null, answer: error instanceof Error ? error.message : String(error) };
    }
  }

  /** True once nothing is being sent or waiting for another try; false if that takes longer than the limit. */
  settled(limitMs: number): Promise<boolean> {
    if (this.isQuiet()) return Promise.resolve(true);
    return new Promise((resolve) => {
      const timer = setTimeout(() => resolve(false), limitMs);
      this.watchers.push(() => {
        clearTimeout(timer);
        resolve(true);
      });
    });
  }

  clear(): void {
    for (const timer of this.retries.keys()) clearTimeout(timer);
    this.retries.clear();
    this.queue = [];
    this.deliveries = [];
    this.holding = false;
    this.toLose = 0;
    this.tellIfQuiet();
  }

  private isQuiet(): boolean {
    return !this.sending && this.queue.length === 0 && this.retries.size === 0;
  }

  private tellIfQuiet(): void {
    if (!this.isQuiet()) return;
    const watchers = this.watchers;
    this.watchers = [];
    for (const watcher of watchers) watcher();
  }

  // One at a time, so that an order asked for by a test is the order seen by the application.
  private pump(): void {
    if (this.sending) return;
    const next = this.queue.shift();
    if (!next) {
      this.tellIfQuiet();
      return;
    }
    this.sending = true;
    void this.attempt(next).finally(() => {
      this.sending = false;
      this.sender.changed();
      this.pump();
    });
  }

  private async attempt(delivery: Delivery): Promise<void> {
    const event = this.sender.findEvent(delivery.eventId);
    if (!event) {
      delivery.state = 'given-up';
      return;
    }
    const body = JSON.stringify(event);
    let outcome: string;
    try {
      const response = await this.post(body, signatureOf(body, this.sender.secret, Math.floor(Date.now() / 1000)));
      await response.arrayBuffer();
      outcome = String(response.status);
      if (response.ok) delivery.state = 'taken';
    } catch (error) {
      outcome = error instanceof Error && error.name === 'TimeoutError' ? 'no answer in time' : 'no connection';
    }
    delivery.attempts.push({ atMs: Date.now(), outcome });
    if (delivery.state === 'taken' || !this.deliveries.includes(delivery)) return;
    const delayMs = RETRY_DELAYS_MS[delivery.attempts.length - 1];
    if (delayMs === undefined) {
      delivery.state = 'given-up';
      return;
    }
    const timer = setTimeout(() => {
      this.retries.delete(timer);
      this.queue.push(delivery);
      this.pump();
    }, delayMs);
    this.retries.set(timer, delivery);
  }

  private post(body: string, signature: string | null): Promise<Response> {
    return fetch(this.sender.url, {
      method: 'POST',
      headers: {
        'content-type': 'application/json; charset=utf-8',
        'user-agent': 'Ohmstead-stand-in/1.0',
        ...(signature === null ? {} : { 'stripe-signature': signature }),
      },
      body,
      redirect: 'manual',
      signal: AbortSignal.timeout(ANSWER_LIMIT_MS),
    });
  }
}

function signatureOf(body: string, secret: string, seconds: number): string {
  return `t=${seconds},v1=${createHmac('sha256', secret).update(`${seconds}.${body}`).digest('hex')}`;
}

function orderOf(held: Delivery[], order: unknown): Delivery[] {
  if (order === undefined || order === 'given') return held;
  if (order === 'reversed') return held.toReversed();
  if (Array.isArray(order)) {
    const named = order.flatMap((wanted) =>
      held.filter((delivery) => delivery.eventId === wanted || delivery.type === wanted),
    );
    return [...new Set([...named, ...held])];
  }
  throw new BadRequest('order must be given, reversed, or a list of event ids or types');
}
