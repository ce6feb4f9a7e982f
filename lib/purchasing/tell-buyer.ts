/** A mail to who raised an order, written to the outbox with the change that it tells of. */
import 'server-only';
import { eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/people';
import { outbox } from '@/db/schema/records';
import { letter, ownUrl } from '@/lib/auth/auth-mail';
import type { OrderRow } from './locked-order';

export async function tellBuyer(
  tx: Tx,
  order: Pick<OrderRow, 'workshopId' | 'id' | 'createdBy' | 'submittedBy'>,
  subject: string,
  lines: readonly string[],
  cause: string,
): Promise<void> {
  const [buyer] = await tx
    .select({ name: person.name, email: person.email })
    .from(person)
    .where(eq(person.id, order.submittedBy ?? order.createdBy));
  if (!buyer) return;
  await tx.insert(outbox).values({
    workshopId: order.workshopId,
    queue: 'send-mail',
    payload: { to: buyer.email, subject, text: letter(buyer.name, lines, ownUrl(`/orders/${order.id}`)), cause },
  });
}
