/** Turns what the database says into refusals: known constraints to sentences, a lost connection to 503. The one place that knows constraint names. */
import { databaseFault } from '@/db/client';
import { type ProblemCode, Refusal } from './problem';

const CONSTRAINTS: Record<string, readonly [ProblemCode, string]> = {
  lot_reserved_within_on_hand: ['stock.short', 'That would take more than is free in the lot. Nothing was changed.'],
  movement_request_once: ['conflict', 'This request has already moved stock. Nothing was moved again.'],
  movement_append_only: ['rule.forbids', 'The ledger is append-only: enter a correcting movement instead.'],
  reservation_amounts: ['rule.forbids', 'That is more than was reserved. Nothing was changed.'],
  revision_frozen: ['state.refused', 'A frozen revision never changes: make a new one.'],
  order_line_over_delivery: [
    'rule.forbids',
    'That is more than was ordered and the workshop allows. Nothing was booked.',
  ],
  circuit_name_once: ['name.taken', 'A circuit of that name is there already.'],
  revision_name_once: ['name.taken', 'This circuit has a revision of that name already.'],
  part_name_once: ['name.taken', 'A part of that name is there already.'],
  cabinet_code_once: ['name.taken', 'A cabinet with that code is there already.'],
  bin_code_once: ['name.taken', 'A bin with that code is there already.'],
  bin_place_once: ['name.taken', 'There is a bin in that place already.'],
  supplier_name_once: ['name.taken', 'A supplier of that name is there already.'],
  offer_code_once: ['name.taken', 'This supplier already offers something under that code.'],
  offer_break_workshop_id_offer_id_from_quantity_pk: ['input.invalid', 'Two breaks start at the same quantity.'],
  person_email_unique: ['name.taken', 'There is an account with that address already.'],
};

const AWAY = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  '57P01',
  '57P02',
  '57P03',
  '08000',
  '08003',
  '08006',
  '08001',
  '53300',
]);

/** character_not_in_repertoire and untranslatable_character: a zero byte, or half of a pair. */
const UNKEEPABLE = new Set(['22021', '22P05']);

/** The refusal behind an error, or null where it is a bug. */
export function refusalFrom(error: unknown): Refusal | null {
  if (error instanceof Refusal) return error;
  const fault = databaseFault(error);
  if (fault?.constraint) {
    const known = CONSTRAINTS[fault.constraint];
    if (known) return new Refusal(known[0], known[1], { cause: error });
  }
  if (fault && AWAY.has(fault.code)) {
    return new Refusal(
      'database.away',
      'The database does not answer right now. Nothing was changed; try again in a moment.',
      { cause: error },
    );
  }
  if (fault && UNKEEPABLE.has(fault.code)) {
    return new Refusal('input.invalid', 'A text holds a character that can’t be kept. Nothing was changed.', {
      cause: error,
    });
  }
  // pg raises these two without a code.
  for (let cause = error, depth = 0; cause instanceof Error && depth < 5; cause = cause.cause, depth += 1) {
    if (/Connection terminated|timeout exceeded when trying to connect/.test(cause.message)) {
      return new Refusal(
        'database.away',
        'The database does not answer right now. Nothing was changed; try again in a moment.',
        { cause: error },
      );
    }
  }
  if (fault?.code === '40001' || fault?.code === '40P01') {
    return new Refusal('conflict', 'Too many people at the same shelf at once. Nothing was changed; try again.', {
      cause: error,
    });
  }
  return null;
}
