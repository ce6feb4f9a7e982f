/**
 * Which lots a need is served from: oldest first, then the fewest bins, then without leaving crumbs. Pure; the caller
 * holds the lots' locks.
 */

export interface LotOnShelf {
  readonly lotId: string;
  readonly binId: string;
  /** Units neither promised nor gone: on hand less reserved. */
  readonly free: number;
  /** Milliseconds since the epoch; older lots go first. */
  readonly receivedAtMs: number;
}

export interface ChosenLot {
  readonly lotId: string;
  readonly quantity: number;
}

/** Lots received within this of the oldest one that is left count as equally old: bags of one week are not worth a second bin. */
const SAME_AGE_MS = 7 * 86_400_000;
/** A remainder of this share of the taken quantity or less is a crumb. */
const CRUMB_SHARE = 0.05;

/**
 * At most `wanted` units (a positive whole number), fewer where the shelf has fewer. Within one age a lot that alone
 * covers the rest is preferred, the one that leaves nothing first, then the one that leaves most (no crumbs); where none
 * covers it, the fullest first, so that few bins are visited. The same input always gives the same choice.
 */
export function chooseLots(wanted: number, shelf: readonly LotOnShelf[]): ChosenLot[] {
  if (!Number.isInteger(wanted) || wanted < 1) throw new RangeError(`${wanted} is not a positive whole number of units`);
  const left = shelf.filter((lot) => lot.free > 0).sort((a, b) => a.receivedAtMs - b.receivedAtMs || (a.lotId < b.lotId ? -1 : 1));
  const chosen: ChosenLot[] = [];
  let open = wanted;
  while (open > 0 && left.length > 0) {
    const oldest = left[0];
    if (!oldest) break;
    const sameAge = left.filter((lot) => lot.receivedAtMs - oldest.receivedAtMs <= SAME_AGE_MS);
    const best = sameAge.reduce((a, b) => (better(b, a, open) ? b : a));
    const quantity = Math.min(open, best.free);
    chosen.push({ lotId: best.lotId, quantity });
    open -= quantity;
    left.splice(left.indexOf(best), 1);
  }
  return chosen;
}

/** Whether `a` serves `open` units better than `b`; both are of one age. */
function better(a: LotOnShelf, b: LotOnShelf, open: number): boolean {
  const [rankA, rankB] = [rank(a, open), rank(b, open)];
  if (rankA !== rankB) return rankA < rankB;
  // Of two that leave a fair rest, and of two that don't suffice, the fuller; the order of arrival settles the rest.
  return a.free > b.free;
}

function rank(lot: LotOnShelf, open: number): number {
  if (lot.free === open) return 0;
  if (lot.free > open) return lot.free - open > open * CRUMB_SHARE ? 1 : 2;
  return 3;
}

export const freeOn = (shelf: readonly LotOnShelf[]): number => shelf.reduce((sum, lot) => sum + Math.max(0, lot.free), 0);
