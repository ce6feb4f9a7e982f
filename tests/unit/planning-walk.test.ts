/** Walking past cabinets, grouping a pick into stops, and coding bins by a pattern. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expandBinPattern } from '@/lib/planning/bin-pattern';
import { groupStops } from '@/lib/planning/group-stops';
import { type BinPlace, byWalkingOrder } from '@/lib/planning/walking-order';

const place = (cabinetCode: string, column: number, row: number, cabinetWalkOrder = 0): BinPlace => ({
  cabinetCode,
  column,
  row,
  cabinetWalkOrder,
});

describe('walking order', () => {
  it('goes down one column and up the next, so that the hand never returns to the top', () => {
    const bins = [place('A', 1, 1), place('A', 2, 1), place('A', 1, 3), place('A', 2, 3), place('A', 3, 2)];
    expect(bins.sort(byWalkingOrder).map((bin) => [bin.column, bin.row])).toEqual([
      [1, 1],
      [1, 3],
      [2, 3],
      [2, 1],
      [3, 2],
    ]);
  });

  it('finishes a cabinet before the next, in the order they stand, and by number where nobody said', () => {
    const bins = [place('C10', 1, 1), place('C9', 5, 1), place('Z', 1, 1, -1)];
    expect(bins.sort(byWalkingOrder).map((bin) => bin.cabinetCode)).toEqual(['Z', 'C9', 'C10']);
  });
});

describe('stops of a pick', () => {
  const line = (binId: string, partId: string, position: number, column = 1) => ({
    ...place('A', column, 1),
    binId,
    partId,
    partName: partId,
    position,
  });

  it('opens a drawer once for a part, for all lines and lots it serves', () => {
    const stops = groupStops([line('x', '4k7', 9), line('y', 'TL072', 1, 2), line('x', '4k7', 2)]);
    expect(stops.map((stop) => stop.map((one) => one.position))).toEqual([[2, 9], [1]]);
  });

  it('keeps two parts of one drawer apart', () => {
    expect(groupStops([line('x', 'b', 1), line('x', 'a', 2)]).map(([first]) => first.partId)).toEqual(['a', 'b']);
  });
});

describe('bins by a pattern', () => {
  it('A-{01..12}-{1..6} is twelve columns of six, coded as the range is written', () => {
    const made = expandBinPattern('A-{01..12}-{1..6}');
    if (!made.ok) throw new Error(made.why);
    expect(made.bins).toHaveLength(72);
    expect(made.bins[0]).toEqual({ code: 'A-01-1', column: 1, row: 1 });
    expect(made.bins.at(-1)).toEqual({ code: 'A-12-6', column: 12, row: 6 });
  });

  it('one range is one row, and one number a range of one', () => {
    expect(expandBinPattern('TRAY{1..2}')).toEqual({
      ok: true,
      bins: [
        { code: 'TRAY1', column: 1, row: 1 },
        { code: 'TRAY2', column: 2, row: 1 },
      ],
    });
    expect(expandBinPattern('A-{13}-{2..2}')).toEqual({ ok: true, bins: [{ code: 'A-13-2', column: 13, row: 2 }] });
  });

  it.each([
    ['A-01-1', 'one or two ranges'],
    ['{1..2}{1..2}{1..2}', 'one or two ranges'],
    ['A-{6..1}-{1..2}', 'go up'],
    ['A-{0..3}', 'start at 1'],
    ['a_{1..2}', 'capitals'],
    ['A-{1..100}-{1..100}', 'at most 3600'],
    ['A-{1..99999}', 'one or two ranges'],
    ['A-VERY-LONG-CABINET-{01..02}', 'longer than 20'],
  ])('refuses %s and says why', (pattern, why) => {
    const made = expandBinPattern(pattern);
    expect(made.ok ? '' : made.why).toContain(why);
  });

  it('never gives a code or a place twice', () => {
    const range = fc
      .tuple(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 0, max: 19 }))
      .map(([from, more]) => ({ from, to: from + more }));
    fc.assert(
      fc.property(range, range, (columns, rows) => {
        const made = expandBinPattern(
          `A-{${String(columns.from).padStart(2, '0')}..${columns.to}}-{${rows.from}..${rows.to}}`,
        );
        if (!made.ok) throw new Error(made.why);
        const count = (columns.to - columns.from + 1) * (rows.to - rows.from + 1);
        expect(new Set(made.bins.map((bin) => bin.code)).size).toBe(count);
        expect(new Set(made.bins.map((bin) => `${bin.column}/${bin.row}`)).size).toBe(count);
      }),
    );
  });
});
