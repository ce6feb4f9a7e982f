/** Submitting and approving: below the workshop's limit an order passes by itself, above it a lead other than the submitter must look. */
import 'server-only';
import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { workshop } from '@/db/schema/people';
import { id } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { ownUrl } from '@/lib/auth/auth-mail';
import { refuseBelowMinimum, refuseStale, repriceDraft } from './draft-order';
import { lockOrder, moveOrder, stateAfter } from './locked-order';
import { moneyText } from './order-money';
import { ORDER_STATES } from './order-states';
import { leadsToAsk } from './leads-to-ask';
import { refusePaymentUnderWay } from './payment-under-way';

const moved = z.object({
  id: id(),
  number: z.string(),
  state: z.enum(ORDER_STATES),
  version: z.number().int(),
  totalMinor: z.number().int(),
});
const asked = z.strictObject({ orderId: id(), version: z.number().int().optional() });

export const submitOrder = command({
  name: 'orders.submit',
  http: 'POST /orders/{orderId}/submit',
  summary:
    'Submit a draft: prices are taken from the offers as they hold now; within the limit it is approved at once.',
  roles: ['buyer', 'lead'],
  input: asked,
  output: moved,
  async run({ tx, actor, input, enqueue, record }) {
    const draft = await lockOrder(tx, actor.workshopId, input.orderId);
    if (input.version !== undefined) refuseStale(draft, input.version);
    const submitted = stateAfter(draft, 'submit');
    const { goodsMinor } = await repriceDraft(tx, draft);
    await refuseBelowMinimum(tx, draft, goodsMinor);
    let order = await moveOrder(tx, draft, submitted, { submittedBy: actor.personId, approvedBy: null });
    const [rules] = await tx
      .select({ limit: workshop.approvalLimitMinor, currency: workshop.currency })
      .from(workshop)
      .where(eq(workshop.id, actor.workshopId));
    if (!rules) throw notFound('workshop');
    // The limit is in the workshop's currency; an order in another always gets a second look.
    if (order.currency === rules.currency && order.totalMinor <= rules.limit) {
      order = await moveOrder(tx, order, stateAfter(order, 'approve'), { approvedBy: actor.personId });
    } else {
      for (const lead of await leadsToAsk(tx, actor.workshopId, actor.personId)) {
        await enqueue({
          queue: 'send-mail',
          payload: {
            to: lead.email,
            subject: `Order ${order.number} waits for your approval`,
            text: `Hello ${lead.name},\n\n${actor.personName} submitted order ${order.number} over ${moneyText(order.totalMinor, order.currency)}, above the limit of ${moneyText(rules.limit, rules.currency)}.\n\n${ownUrl(`/orders/${order.id}`)}\n\nOhmstead`,
            cause: `approval:${order.id}:${order.version}:${lead.personId}`,
          },
        });
      }
    }
    record(order.id, { state: order.state, totalMinor: order.totalMinor });
    return order;
  },
});

export const approveOrder = command({
  name: 'orders.approve',
  http: 'POST /orders/{orderId}/approve',
  summary: 'Approve a submitted order above the limit; not one’s own.',
  roles: ['lead'],
  input: asked,
  output: moved,
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    if (input.version !== undefined) refuseStale(order, input.version);
    const next = stateAfter(order, 'approve');
    if (order.submittedBy === actor.personId)
      throw new Refusal('rule.forbids', 'Four eyes: somebody else than who submitted it must approve this order.');
    const approved = await moveOrder(tx, order, next, { approvedBy: actor.personId });
    record(order.id, { totalMinor: order.totalMinor });
    return approved;
  },
});

export const returnOrderToDraft = command({
  name: 'orders.return-to-draft',
  http: 'POST /orders/{orderId}/return-to-draft',
  summary: 'Take a submitted or approved order back to draft, with a reason.',
  roles: ['buyer', 'lead'],
  input: z.strictObject({ orderId: id(), reason: z.string().trim().min(1, 'say why').max(500) }),
  output: moved,
  async run({ tx, actor, input, record }) {
    const order = await lockOrder(tx, actor.workshopId, input.orderId);
    const next = stateAfter(order, 'return-to-draft');
    await refusePaymentUnderWay(tx, order.workshopId, order.id, order.number);
    const draft = await moveOrder(tx, order, next, { submittedBy: null, approvedBy: null });
    record(order.id, { reason: input.reason });
    return draft;
  },
});
