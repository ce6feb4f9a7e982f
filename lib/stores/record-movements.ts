/**
 * Enters movements in the ledger. The only code that does: the trigger behind the insert changes the lots, so whoever
 * moves stock comes through here and leaves a line with its cause.
 */
import 'server-only';
import { movement, type MOVEMENT_KINDS } from '@/db/schema/stores';
import type { CommandContext } from '@/lib/api/use-case';

export interface Movement {
  readonly kind: (typeof MOVEMENT_KINDS)[number];
  readonly lotId: string;
  readonly partId: string;
  readonly binId: string;
  /** Signed, in the part's stock unit; never 0. */
  readonly quantity: number;
  /** What caused it, such as `receipt-line`, `reservation`, `count-entry`, `move`. */
  readonly referenceType: string;
  readonly referenceId: string;
  readonly reason?: string;
}

/**
 * One insert for all. Lock the lots first, in the fixed order (part id, then lot id). `startAt` numbers on where one
 * request enters movements in several calls. The same request can't enter a movement twice (movement_request_once).
 */
export async function recordMovements(
  context: Pick<CommandContext<unknown>, 'tx' | 'actor' | 'requestKey'>,
  movements: readonly Movement[],
  startAt = 0,
): Promise<void> {
  if (movements.length === 0) return;
  await context.tx.insert(movement).values(
    movements.map((entry, index) => ({
      workshopId: context.actor.workshopId,
      kind: entry.kind,
      lotId: entry.lotId,
      partId: entry.partId,
      binId: entry.binId,
      quantity: entry.quantity,
      referenceType: entry.referenceType,
      referenceId: entry.referenceId,
      reason: entry.reason ?? '',
      personId: context.actor.personId,
      requestKey: context.requestKey,
      requestLine: startAt + index,
    })),
  );
}
