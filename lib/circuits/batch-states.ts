/** The life of a batch as one table. Pure; every other change is refused. */

export const BATCH_STATES = ['planned', 'reserved', 'picking', 'kitted', 'finished', 'cancelled'] as const;
export type BatchState = (typeof BATCH_STATES)[number];

export const BATCH_ACTS = ['reserve', 'pick', 'complete-kit', 'finish', 'cancel'] as const;
export type BatchAct = (typeof BATCH_ACTS)[number];

const TRANSITIONS: Readonly<Record<BatchAct, Readonly<Partial<Record<BatchState, BatchState>>>>> = {
  // Reserving tops up: after a delivery what was short is reserved too, also while picking.
  reserve: { planned: 'reserved', reserved: 'reserved', picking: 'picking' },
  pick: { reserved: 'picking', picking: 'picking' },
  'complete-kit': { reserved: 'kitted', picking: 'kitted' },
  finish: { kitted: 'finished' },
  // Gives everything back: reservations are released, picked units return.
  cancel: { planned: 'cancelled', reserved: 'cancelled', picking: 'cancelled', kitted: 'cancelled' },
};

/** The state after the act, or null where the act is not possible in that state. */
export function batchStateAfter(state: BatchState, act: BatchAct): BatchState | null {
  return TRANSITIONS[act][state] ?? null;
}

export function batchActsIn(state: BatchState): readonly BatchAct[] {
  return BATCH_ACTS.filter((act) => batchStateAfter(state, act) !== null);
}
