/** Where a counted difference is booked; the rules are ours, with their reasons in lib/planning/README.md. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type CountedLot, spreadVariance } from '@/lib/planning/spread-variance';

const lot = (
  lotId: string,
  onHand: number,
  receivedAtMs: number,
  ...promises: [string, number, number][]
): CountedLot => ({
  lotId,
  onHand,
  receivedAtMs,
  promises: promises.map(([reservationId, open, madeAtMs]) => ({ reservationId, open, madeAtMs })),
});

describe('booking a counted difference', () => {
  it('adds a surplus to the newest lot', () => {
    expect(spreadVariance(4, [lot('old', 10, 1), lot('new', 2, 2)])).toEqual({
      changes: [{ lotId: 'new', quantity: 4 }],
      releases: [],
      uncovered: 0,
    });
  });

  it('takes a shortage from free units, newest lot first, and leaves every promise alone', () => {
    const spread = spreadVariance(-7, [lot('old', 10, 1, ['r', 4, 1]), lot('new', 5, 2)]);
    expect(spread).toEqual({
      changes: [
        { lotId: 'new', quantity: -5 },
        { lotId: 'old', quantity: -2 },
      ],
      releases: [],
      uncovered: 0,
    });
  });

  it('gives up the promise made last where free units don’t cover it, whichever lot that is on', () => {
    const spread = spreadVariance(-5, [lot('old', 6, 1, ['young', 6, 20]), lot('new', 4, 2, ['early', 4, 10])]);
    expect(spread).toEqual({
      changes: [{ lotId: 'old', quantity: -5 }],
      releases: [{ reservationId: 'young', quantity: 5 }],
      uncovered: 0,
    });
  });

  it('says what can’t be booked because the lots were emptied since', () => {
    expect(spreadVariance(-9, [lot('a', 3, 1)])).toEqual({
      changes: [{ lotId: 'a', quantity: -3 }],
      releases: [],
      uncovered: 6,
    });
  });

  it('for any lots: what is booked and what is uncovered make the variance, no lot goes below zero, and what stays promised is there', () => {
    const anyLot = fc.record({
      onHand: fc.integer({ min: 0, max: 30 }),
      age: fc.integer({ min: 0, max: 9 }),
      shares: fc.array(fc.record({ share: fc.integer({ min: 1, max: 10 }), at: fc.integer({ min: 0, max: 9 }) }), {
        maxLength: 3,
      }),
    });
    fc.assert(
      fc.property(
        fc.array(anyLot, { minLength: 1, maxLength: 6 }),
        fc.integer({ min: -80, max: 40 }),
        (drawn, variance) => {
          const lots = drawn.map(({ onHand, age, shares }, index) => {
            let left = onHand;
            const promises = shares.flatMap(({ share, at }, n): [string, number, number][] => {
              const open = Math.min(share, left);
              left -= open;
              return open > 0 ? [[`r${index}-${n}`, open, at]] : [];
            });
            return lot(`lot${index}`, onHand, age, ...promises);
          });
          const spread = spreadVariance(variance, lots);
          const booked = spread.changes.reduce((sum, one) => sum + one.quantity, 0);
          expect(booked - spread.uncovered).toBe(variance);
          for (const one of lots) {
            const onHand =
              one.onHand +
              spread.changes
                .filter((change) => change.lotId === one.lotId)
                .reduce((sum, change) => sum + change.quantity, 0);
            const promised = one.promises.reduce(
              (sum, promise) =>
                sum +
                promise.open -
                (spread.releases.find((release) => release.reservationId === promise.reservationId)?.quantity ?? 0),
              0,
            );
            expect(onHand).toBeGreaterThanOrEqual(promised);
            expect(promised).toBeGreaterThanOrEqual(0);
          }
          // No promise is given up while free units are left.
          if (spread.releases.length > 0)
            expect(-booked).toBeGreaterThan(
              lots.reduce((sum, one) => sum + one.onHand - one.promises.reduce((s, p) => s + p.open, 0), 0),
            );
        },
      ),
    );
  });
});
