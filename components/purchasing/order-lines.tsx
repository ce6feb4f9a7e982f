'use client';
/** The lines of an order; in a draft their quantities can be changed and lines taken out. Client: it holds the changes. */
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { useCommand } from '@/lib/api/client';
import type { changeOrderLines } from '@/lib/purchasing/draft-order';
import { money, unitPriceText } from './money';
import type { OrderFacts } from './order-facts';

export function OrderLines({ order, mayChange }: { readonly order: OrderFacts; readonly mayChange: boolean }) {
  const router = useRouter();
  const say = useSay();
  const [changed, setChanged] = useState<Readonly<Record<string, string>>>({});
  const change = useCommand<typeof changeOrderLines>('PUT /orders/{orderId}/lines');
  const quantityOf = (line: OrderFacts['lines'][number]) => changed[line.id] ?? String(line.quantity);
  const dirty = order.lines.some((line) => quantityOf(line) !== String(line.quantity));
  const sent = order.sentAt !== null;

  function save() {
    const lines = order.lines
      .map((line) => ({ offerId: line.offerId, quantity: Number(quantityOf(line)) }))
      .filter((line) => line.quantity !== 0);
    change.mutate(
      { orderId: order.id, version: order.version, lines },
      {
        onSuccess: () => {
          setChanged({});
          say('The draft was changed');
          router.refresh();
        },
      },
    );
  }
  return (
    <>
      {change.error ? (
        <div className="mb-3">
          <Notice tone="stop" announce title={change.error.details.title}>
            {change.error.details.detail}
          </Notice>
        </div>
      ) : null}
      <Table label={`Lines of order ${order.number}`} stacked>
        <TableHead>
          <HeadCell>Part</HeadCell>
          <HeadCell>Supplier’s code</HeadCell>
          <HeadCell>Who waits</HeadCell>
          <HeadCell number>Quantity</HeadCell>
          {sent ? <HeadCell number>Received</HeadCell> : null}
          <HeadCell number>Each</HeadCell>
          <HeadCell number>Together</HeadCell>
        </TableHead>
        <TableBody>
          {order.lines.map((line) => (
            <TableRow key={line.id}>
              <Cell label="Part">
                <Link href={`/parts/${line.partId}`} className="font-semibold text-copper hover:underline">
                  {line.partName}
                </Link>
              </Cell>
              <Cell label="Code" mono>
                {line.supplierCode}
              </Cell>
              <Cell label="Who waits">
                {line.waiting.slice(0, 3).map((batch) => (
                  <Link
                    key={batch.batchId}
                    href={`/batches/${batch.batchId}`}
                    className="mr-2 font-mono text-small text-copper hover:underline"
                  >
                    {batch.number}
                  </Link>
                ))}
              </Cell>
              <Cell label="Quantity" number>
                {mayChange ? (
                  <span className="ml-auto block w-24">
                    <NumberField
                      label={`Quantity of ${line.partName}`}
                      hideLabel
                      value={quantityOf(line)}
                      onChange={(event) => setChanged((before) => ({ ...before, [line.id]: event.target.value }))}
                    />
                  </span>
                ) : (
                  <>
                    {line.quantity}
                    {line.cancelled > 0 ? (
                      <span className="block text-small text-oxide">{line.cancelled} taken off</span>
                    ) : null}
                  </>
                )}
              </Cell>
              {sent ? (
                <Cell label="Received" number>
                  {line.received}
                </Cell>
              ) : null}
              <Cell label="Each" number>
                {unitPriceText(line.unitPrice, order.currency)}
              </Cell>
              <Cell label="Together" number>
                {money(line.totalMinor, order.currency)}
              </Cell>
            </TableRow>
          ))}
        </TableBody>
      </Table>
      {mayChange ? (
        <div className="mt-3 flex flex-wrap items-center gap-3">
          <Button busy={change.isPending} busyWord="Changing …" disabled={!dirty} onClick={save}>
            Change the quantities
          </Button>
          <span className="text-small text-soft">
            0 takes a line out. Breaks, multiples and minimums are applied again.
          </span>
        </div>
      ) : null}
    </>
  );
}
