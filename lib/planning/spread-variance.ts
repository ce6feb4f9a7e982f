/** Where a counted difference goes among the lots of one part in one bin, which nobody can tell apart by eye. Pure. */

export interface CountedLot {
  readonly lotId: string;
  readonly onHand: number;
  readonly reserved: number;
  readonly receivedAtMs: number;
}

export interface VarianceSpread {
  readonly changes: readonly { readonly lotId: string; readonly quantity: number }[];
  /** Units that no free stock covers: so many promises must be given up, of these lots. */
  readonly release: readonly { readonly lotId: string; readonly quantity: number }[];
  /** Part of a shortage that not even all lots cover (they were emptied since); nothing is booked for it. */
  readonly uncovered: number;
}

/**
 * A surplus joins the newest lot. A shortage is taken from free units first, newest lot first (the oldest is what picks
 * have been taken from and is likeliest right), and only then from promised ones.
 */
export function spreadVariance(variance: number, lots: readonly CountedLot[]): VarianceSpread {
  const newestFirst = [...lots].sort((a, b) => b.receivedAtMs - a.receivedAtMs || (a.lotId < b.lotId ? 1 : -1));
  const newest = newestFirst[0];
  if (variance > 0 && newest) return { changes: [{ lotId: newest.lotId, quantity: variance }], release: [], uncovered: 0 };
  if (variance >= 0) return { changes: [], release: [], uncovered: 0 };
  let short = -variance;
  const taken = new Map<string, number>();
  const release: { lotId: string; quantity: number }[] = [];
  for (const lot of newestFirst) {
    const free = Math.min(short, lot.onHand - lot.reserved);
    if (free > 0) taken.set(lot.lotId, free);
    short -= Math.max(0, free);
  }
  for (const lot of newestFirst) {
    const promised = Math.min(short, lot.reserved);
    if (promised > 0) {
      taken.set(lot.lotId, (taken.get(lot.lotId) ?? 0) + promised);
      release.push({ lotId: lot.lotId, quantity: promised });
    }
    short -= promised;
  }
  return { changes: [...taken].map(([lotId, quantity]) => ({ lotId, quantity: -quantity })), release, uncovered: short };
}
