/** Where a counted difference goes among the lots of one part in one bin, which nobody can tell apart by eye. Pure. */

export interface CountedLot {
  readonly lotId: string;
  readonly onHand: number;
  readonly receivedAtMs: number;
  /** Open reservations on it. Their sum is what is promised of the lot. */
  readonly promises: readonly OpenPromise[];
}

export interface OpenPromise {
  readonly reservationId: string;
  readonly open: number;
  readonly madeAtMs: number;
}

export interface VarianceSpread {
  readonly changes: readonly { readonly lotId: string; readonly quantity: number }[];
  /** Promises of units that are not there, youngest first: so much of each must be given up. */
  readonly releases: readonly { readonly reservationId: string; readonly quantity: number }[];
  /** Part of a shortage that not even all lots cover (they were emptied since); nothing can be booked for it. */
  readonly uncovered: number;
}

/**
 * A surplus joins the newest lot: the last bag put in is what was likeliest miscounted, and new units must not look old.
 * A shortage is taken from free units, newest lot first for the same reason; only what they don't cover is taken from
 * promised ones, and then the promise made last gives way, whichever lot it is on. `variance` is a whole number of units.
 */
export function spreadVariance(variance: number, lots: readonly CountedLot[]): VarianceSpread {
  if (!Number.isInteger(variance)) throw new RangeError(`${variance} is not a whole number of units`);
  const newestFirst = [...lots].sort((a, b) => b.receivedAtMs - a.receivedAtMs || (a.lotId < b.lotId ? 1 : -1));
  if (variance >= 0) {
    const newest = newestFirst[0];
    const changes = newest && variance > 0 ? [{ lotId: newest.lotId, quantity: variance }] : [];
    return { changes, releases: [], uncovered: 0 };
  }
  let short = -variance;
  const taken = new Map<string, number>();
  const take = (lotId: string, most: number): number => {
    const units = Math.max(0, Math.min(short, most));
    if (units > 0) taken.set(lotId, (taken.get(lotId) ?? 0) + units);
    short -= units;
    return units;
  };
  for (const lot of newestFirst) take(lot.lotId, lot.onHand - promisedOf(lot));
  const youngestFirst = newestFirst
    .flatMap((lot) => lot.promises.map((promise) => ({ ...promise, lotId: lot.lotId })))
    .sort((a, b) => b.madeAtMs - a.madeAtMs || (a.reservationId < b.reservationId ? 1 : -1));
  const releases = youngestFirst.flatMap(({ reservationId, open, lotId }) => {
    const quantity = take(lotId, open);
    return quantity > 0 ? [{ reservationId, quantity }] : [];
  });
  const changes = [...taken].map(([lotId, quantity]) => ({ lotId, quantity: -quantity }));
  return { changes, releases, uncovered: short };
}

const promisedOf = (lot: CountedLot): number => lot.promises.reduce((sum, promise) => sum + promise.open, 0);
