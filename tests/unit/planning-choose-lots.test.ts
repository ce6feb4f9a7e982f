/** Choosing lots: first in, first out and few bins are common practice in stores; the tie-breaks are ours (lib/planning/README.md). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chooseLots, freeOn, type LotOnShelf } from '@/lib/planning/choose-lots';

const DAY_MS = 86_400_000;
const lot = (lotId: string, binId: string, free: number, ageDays = 0, doubtful = false): LotOnShelf => ({
  lotId,
  binId,
  free,
  receivedAtMs: Date.UTC(2026, 10, 1) - ageDays * DAY_MS,
  doubtful,
});
const take = (wanted: number, ...shelf: LotOnShelf[]) =>
  chooseLots(wanted, shelf).map((one) => [one.lotId, one.quantity]);

describe('choosing lots', () => {
  it('takes the oldest first, though a newer lot alone would do', () => {
    expect(take(10, lot('new', 'B', 500), lot('old', 'A', 4, 90))).toEqual([
      ['old', 4],
      ['new', 6],
    ]);
  });

  it('opens one drawer where one drawer suffices, even when its units came in two bags', () => {
    expect(take(10, lot('a', 'X', 5, 1), lot('b', 'Y', 8), lot('c', 'X', 5), lot('d', 'Z', 2))).toEqual([
      ['a', 5],
      ['c', 5],
    ]);
  });

  it('empties the drawer that holds exactly what is wanted', () => {
    expect(take(12, lot('full', 'X', 400), lot('exact', 'Y', 12))).toEqual([['exact', 12]]);
  });

  it('leaves no crumbs: a hundred come from the drawer that keeps a fair rest', () => {
    expect(take(100, lot('crumb', 'X', 103), lot('fair', 'Y', 160))).toEqual([['fair', 100]]);
  });

  it('starts with the fullest drawer where no single one suffices', () => {
    expect(take(20, lot('a', 'X', 3), lot('b', 'Y', 12), lot('c', 'Z', 9))).toEqual([
      ['b', 12],
      ['c', 8],
    ]);
  });

  it('goes back to a drawer already open rather than to a new one', () => {
    expect(take(10, lot('old', 'X', 4, 60), lot('elsewhere', 'Y', 6), lot('again', 'X', 30))).toEqual([
      ['old', 4],
      ['again', 6],
    ]);
  });

  it('takes from a drawer in doubt only what nothing else covers, however old it is', () => {
    expect(take(10, lot('ghost', 'X', 50, 300, true), lot('sure', 'Y', 7))).toEqual([
      ['sure', 7],
      ['ghost', 3],
    ]);
  });

  it('gives what there is where there is too little, and nothing from an empty shelf', () => {
    expect(take(10, lot('a', 'X', 3), lot('gone', 'Y', 0))).toEqual([['a', 3]]);
    expect(take(1)).toEqual([]);
  });

  it('refuses a wish that is not a positive whole number', () => {
    for (const wanted of [0, -1, 1.5, Number.NaN]) expect(() => chooseLots(wanted, [])).toThrow(RangeError);
  });

  it('on any shelf: takes just enough, never more than is free, never a lot twice, never passes over one a week older, and the order of the rows is nothing to it', () => {
    const anyLot = fc.record({
      bin: fc.integer({ min: 1, max: 5 }),
      free: fc.integer({ min: -2, max: 40 }),
      ageDays: fc.integer({ min: 0, max: 40 }),
      doubtful: fc.boolean(),
    });
    fc.assert(
      fc.property(
        fc.array(anyLot, { maxLength: 12 }),
        fc.integer({ min: 1, max: 150 }),
        fc.integer(),
        (drawn, wanted, seed) => {
          const shelf = drawn.map((one, index) =>
            lot(`lot-${String(index).padStart(2, '0')}`, `bin-${one.bin}`, one.free, one.ageDays, one.doubtful),
          );
          const chosen = chooseLots(wanted, shelf);
          expect(chosen.reduce((sum, one) => sum + one.quantity, 0)).toBe(Math.min(wanted, freeOn(shelf)));
          expect(new Set(chosen.map((one) => one.lotId)).size).toBe(chosen.length);
          const taken = new Map(chosen.map((one) => [one.lotId, one.quantity]));
          for (const one of shelf) expect(taken.get(one.lotId) ?? 0).toBeLessThanOrEqual(Math.max(0, one.free));
          for (const kept of shelf.filter((one) => one.free > (taken.get(one.lotId) ?? 0))) {
            for (const used of shelf.filter((one) => taken.has(one.lotId))) {
              if (kept.doubtful !== used.doubtful) expect(used.doubtful).toBe(false);
              else expect(used.receivedAtMs - kept.receivedAtMs).toBeLessThanOrEqual(7 * DAY_MS);
            }
          }
          const shuffled = [...shelf].sort(
            (a, b) => ((a.receivedAtMs * 31 + a.free + seed) % 7) - ((b.receivedAtMs * 31 + b.free + seed) % 7),
          );
          expect(chooseLots(wanted, shuffled)).toEqual(chosen);
        },
      ),
    );
  });
});
