/** The life of an order as one table: which act leads from which state to which. Pure; every other change is refused. */

export const ORDER_STATES = [
  'draft',
  'submitted',
  'approved',
  'paid',
  'on-account',
  'sent',
  'part-received',
  'received',
  'closed',
  'cancelled',
] as const;
export type OrderState = (typeof ORDER_STATES)[number];

export const ORDER_ACTS = [
  'submit',
  'approve',
  'return-to-draft',
  'pay',
  'put-on-account',
  'send',
  'receive-part',
  'receive-all',
  'settle-short',
  'close',
  'cancel',
] as const;
export type OrderAct = (typeof ORDER_ACTS)[number];

const TRANSITIONS: Readonly<Record<OrderAct, Readonly<Partial<Record<OrderState, OrderState>>>>> = {
  submit: { draft: 'submitted' },
  approve: { submitted: 'approved' },
  'return-to-draft': { submitted: 'draft', approved: 'draft' },
  pay: { approved: 'paid' },
  'put-on-account': { approved: 'on-account' },
  send: { paid: 'sent', 'on-account': 'sent' },
  'receive-part': { sent: 'part-received', 'part-received': 'part-received' },
  'receive-all': { sent: 'received', 'part-received': 'received' },
  // What did not come is not owed any more; what came stays.
  'settle-short': { sent: 'received', 'part-received': 'received' },
  close: { received: 'closed' },
  // Not once something was received: settle what is missing instead.
  cancel: {
    draft: 'cancelled',
    submitted: 'cancelled',
    approved: 'cancelled',
    paid: 'cancelled',
    'on-account': 'cancelled',
    sent: 'cancelled',
  },
};

/** The state after the act, or null where the act is not possible in that state. */
export function orderStateAfter(state: OrderState, act: OrderAct): OrderState | null {
  return TRANSITIONS[act][state] ?? null;
}

/** What can be done now, in the order of the table. */
export function orderActsIn(state: OrderState): readonly OrderAct[] {
  return ORDER_ACTS.filter((act) => orderStateAfter(state, act) !== null);
}

/** Stock on these is on its way and counts against shortfalls. */
export const ON_ORDER_STATES: readonly OrderState[] = [
  'draft',
  'submitted',
  'approved',
  'paid',
  'on-account',
  'sent',
  'part-received',
];
