/** Batches and counts move only as ARCHITECTURE.md draws them; every pair of state and act is looked at. */
import { describe, expect, it } from 'vitest';
import { BATCH_ACTS, BATCH_STATES, batchActsIn, batchStateAfter } from '@/lib/circuits/batch-states';
import { COUNT_ACTS, COUNT_STATES, countStateAfter } from '@/lib/stores/count-states';

describe('the life of a batch', () => {
  // Written out from the design, not from the table: state, act, next.
  const ALLOWED = new Set([
    'planned reserve reserved',
    'reserved reserve reserved',
    'picking reserve picking',
    'reserved pick picking',
    'picking pick picking',
    'reserved complete-kit kitted',
    'picking complete-kit kitted',
    'kitted finish finished',
    'planned cancel cancelled',
    'reserved cancel cancelled',
    'picking cancel cancelled',
    'kitted cancel cancelled',
  ]);
  it('allows what the design draws and nothing else', () => {
    for (const state of BATCH_STATES) {
      for (const act of BATCH_ACTS) {
        const next = batchStateAfter(state, act);
        const drawn = [...ALLOWED].find((one) => one.startsWith(`${state} ${act} `));
        expect(next === null ? undefined : `${state} ${act} ${next}`, `${act} in ${state}`).toBe(drawn);
      }
    }
  });
  it('ends finished or cancelled for good', () => {
    expect(BATCH_STATES.filter((state) => batchActsIn(state).length === 0)).toEqual(['finished', 'cancelled']);
  });
});

describe('the life of a count', () => {
  const ALLOWED = new Set([
    'open enter open',
    'recount enter recount',
    'open complete counted',
    'recount complete counted',
    'counted ask-again recount',
    'counted post posted',
    'open abandon abandoned',
    'counted abandon abandoned',
    'recount abandon abandoned',
  ]);
  it('allows what the design draws and nothing else: nothing is posted before all is counted', () => {
    for (const state of COUNT_STATES) {
      for (const act of COUNT_ACTS) {
        const next = countStateAfter(state, act);
        const drawn = [...ALLOWED].find((one) => one.startsWith(`${state} ${act} `));
        expect(next === null ? undefined : `${state} ${act} ${next}`, `${act} in ${state}`).toBe(drawn);
      }
    }
  });
});
