/**
 * Trouble ordered ahead of time: the next N requests to a service are delayed, refused or dropped. Each entry is used
 * up as it strikes, so that a test that has ended leaves nothing behind but what it did not use.
 */
import { BadRequest } from './http';

export const SERVICES = ['payments', 'uploads', 'mail'] as const;
export type Service = (typeof SERVICES)[number];

export type Trouble = {
  service: Service;
  /** Only requests whose "METHOD /path" contains this text; null for any. */
  match: string | null;
  times: number;
  delayMs: number;
  /** Answered instead of doing the work. */
  status: number | null;
  /** The connection is cut before the work is done, or after it is done and before it is answered. */
  drop: 'before' | 'after' | null;
};

const MOST_DELAY_MS = 60_000;
const MOST_WAITING = 100;

export class Troubles {
  private waiting: Trouble[] = [];

  /** Takes an order as it came in JSON. Throws BadRequest for one that makes no sense. */
  order(given: Record<string, unknown>): Trouble {
    const service = SERVICES.find((name) => name === given.service);
    if (!service) throw new BadRequest(`service must be one of ${SERVICES.join(', ')}`);
    const trouble: Trouble = {
      service,
      match: typeof given.match === 'string' ? given.match : null,
      times: whole(given.times, 'times', 1, 1, 1_000),
      delayMs: whole(given.delayMs, 'delayMs', 0, 0, MOST_DELAY_MS),
      status: given.status === undefined ? null : whole(given.status, 'status', 500, 400, 599),
      drop: given.drop === 'before' || given.drop === 'after' ? given.drop : null,
    };
    if (given.drop !== undefined && trouble.drop === null) throw new BadRequest('drop must be before or after');
    if (trouble.delayMs === 0 && trouble.status === null && trouble.drop === null)
      throw new BadRequest('name a delayMs, a status or a drop');
    if (this.waiting.length >= MOST_WAITING) throw new BadRequest(`${MOST_WAITING} troubles are waiting already`);
    this.waiting.push(trouble);
    return trouble;
  }

  /** The trouble that strikes this request, in the order they were given. */
  take(service: Service, request: string): Trouble | null {
    const found = this.waiting.find(
      (trouble) => trouble.service === service && (trouble.match === null || request.includes(trouble.match)),
    );
    if (!found) return null;
    found.times -= 1;
    if (found.times === 0) this.waiting = this.waiting.filter((trouble) => trouble !== found);
    return found;
  }

  list(): readonly Trouble[] {
    return this.waiting;
  }

  clear(): void {
    this.waiting = [];
  }
}

/** Resolves after that long; never rejects. */
export const delay = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

export function whole(value: unknown, name: string, fallback: number, least: number, most: number): number {
  if (value === undefined) return fallback;
  if (typeof value !== 'number' || !Number.isInteger(value) || value < least || value > most)
    throw new BadRequest(`${name} must be a whole number from ${least} to ${most}`);
  return value;
}
