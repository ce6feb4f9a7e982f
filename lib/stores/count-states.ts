/** The life of a stock count as one table. Pure; every other change is refused. */

export const COUNT_STATES = ['open', 'counted', 'recount', 'posted', 'abandoned'] as const;
export type CountState = (typeof COUNT_STATES)[number];

export const COUNT_ACTS = ['enter', 'complete', 'ask-again', 'post', 'abandon'] as const;
export type CountAct = (typeof COUNT_ACTS)[number];

const TRANSITIONS: Readonly<Record<CountAct, Readonly<Partial<Record<CountState, CountState>>>>> = {
  enter: { open: 'open', recount: 'recount' },
  complete: { open: 'counted', recount: 'counted' },
  'ask-again': { counted: 'recount' },
  post: { counted: 'posted' },
  abandon: { open: 'abandoned', counted: 'abandoned', recount: 'abandoned' },
};

export function countStateAfter(state: CountState, act: CountAct): CountState | null {
  return TRANSITIONS[act][state] ?? null;
}
