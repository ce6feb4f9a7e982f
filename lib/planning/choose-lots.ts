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
  /** A pick found fewer in its bin than the ledger says, and nobody has counted since. */
  readonly doubtful?: boolean;
}

export interface ChosenLot {
  readonly lotId: string;
  readonly quantity: number;
}

/** Lots received within this of the oldest one left count as equally old: bags of one week are not worth a second bin. */
const SAME_AGE_MS = 7 * 86_400_000;
/** A remainder of this share of what is taken, or less, is a crumb: a bin that next time sends somebody for nothing. */
const CRUMB_SHARE = 0.05;

interface BinOfAge {
  readonly lots: readonly LotOnShelf[];
  readonly free: number;
}

/**
 * At most `wanted` units (a positive whole number), fewer where the shelf has fewer. Doubtful lots serve only when all
 * others are used up. Within one age a bin that alone covers the rest is preferred: one already visited, then one that it
 * empties, then one that keeps a fair rest, then one left with crumbs; where none covers it, the visited, then the fullest. In a
 * bin the oldest lot goes first. The same input always gives the same choice.
 */
export function chooseLots(wanted: number, shelf: readonly LotOnShelf[]): ChosenLot[] {
  if (!Number.isInteger(wanted) || wanted < 1)
    throw new RangeError(`${wanted} is not a positive whole number of units`);
  const chosen: ChosenLot[] = [];
  const visited = new Set<string>();
  let open = wanted;
  for (const doubtful of [false, true]) {
    let left = shelf.filter((lot) => lot.free > 0 && (lot.doubtful ?? false) === doubtful).sort(byAge);
    while (open > 0) {
      const oldest = left[0];
      if (!oldest) break;
      const bins = binsOf(left.filter((lot) => lot.receivedAtMs - oldest.receivedAtMs <= SAME_AGE_MS));
      const best = bins.reduce((a, b) => (serves(b, a, open, visited) ? b : a));
      for (const lot of best.lots) {
        if (open === 0) break;
        const quantity = Math.min(open, lot.free);
        chosen.push({ lotId: lot.lotId, quantity });
        visited.add(lot.binId);
        open -= quantity;
      }
      const used = new Set(best.lots.map((lot) => lot.lotId));
      left = left.filter((lot) => !used.has(lot.lotId));
    }
  }
  return chosen;
}

export const freeOn = (shelf: readonly LotOnShelf[]): number =>
  shelf.reduce((sum, lot) => sum + Math.max(0, lot.free), 0);

function byAge(a: LotOnShelf, b: LotOnShelf): number {
  return a.receivedAtMs - b.receivedAtMs || (a.lotId < b.lotId ? -1 : 1);
}

/** Lots of one age by the bin they lie in, bins in the order of their oldest lot. */
function binsOf(sameAge: readonly LotOnShelf[]): [BinOfAge, ...BinOfAge[]] {
  const byBin = new Map<string, LotOnShelf[]>();
  for (const lot of sameAge) byBin.set(lot.binId, [...(byBin.get(lot.binId) ?? []), lot]);
  const bins = [...byBin.values()].map((lots) => ({ lots, free: freeOn(lots) }));
  const [first, ...others] = bins;
  if (!first) throw new RangeError('no lot of that age');
  return [first, ...others];
}

/** Whether bin `a` serves `open` units better than `b`; both are of one age. Equal ones keep the order of arrival. */
function serves(a: BinOfAge, b: BinOfAge, open: number, visited: ReadonlySet<string>): boolean {
  const [rankA, rankB] = [rank(a, open, visited), rank(b, open, visited)];
  if (rankA !== rankB) return rankA < rankB;
  return a.free > b.free;
}

function rank(bin: BinOfAge, open: number, visited: ReadonlySet<string>): number {
  const wasThere = bin.lots.some((lot) => visited.has(lot.binId));
  if (bin.free < open) return wasThere ? 5 : 6;
  if (wasThere) return bin.free === open ? 0 : 1;
  if (bin.free === open) return 2;
  return bin.free - open <= open * CRUMB_SHARE ? 4 : 3;
}
