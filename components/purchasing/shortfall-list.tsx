'use client';
/**
 * What is short, who waits for it, and where it would be bought: the cheapest offer stands chosen, another may be. One
 * press raises a draft order for each supplier. Client: it holds what is chosen and what is left out.
 */
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { z } from 'zod';
import { Button } from '@/components/ui/button';
import { SelectField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { useCommand } from '@/lib/api/client';
import type { orderShortfalls } from '@/lib/purchasing/order-shortfalls';
import type { listShortfalls } from '@/lib/purchasing/shortfalls';
import { money, unitPriceText } from './money';

type Shortfall = z.output<typeof listShortfalls.output>['shortfalls'][number];

export function ShortfallList({
  shortfalls,
  mayBuy,
}: {
  readonly shortfalls: readonly Shortfall[];
  readonly mayBuy: boolean;
}) {
  const router = useRouter();
  const [offers, setOffers] = useState<Readonly<Record<string, string>>>({});
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const raise = useCommand<typeof orderShortfalls>('POST /orders/from-shortfalls');

  const chosenOf = (one: Shortfall) =>
    one.purchases.find((purchase) => purchase.offerId === offers[one.partId]) ?? one.purchases[0];
  const wanted = shortfalls.filter((one) => !left.has(one.partId) && one.purchases.length > 0);
  const sums = new Map<string, { supplier: string; currency: string; minor: number; lines: number }>();
  for (const one of wanted) {
    const purchase = chosenOf(one);
    if (!purchase) continue;
    const sum = sums.get(purchase.supplierId) ?? {
      supplier: purchase.supplierName,
      currency: purchase.currency,
      minor: 0,
      lines: 0,
    };
    sums.set(purchase.supplierId, { ...sum, minor: sum.minor + purchase.totalMinor, lines: sum.lines + 1 });
  }
  function toggle(partId: string) {
    setLeft((before) => {
      const after = new Set(before);
      if (!after.delete(partId)) after.add(partId);
      return after;
    });
  }
  function send() {
    raise.mutate(
      {
        parts: wanted.map((one) => ({
          partId: one.partId,
          ...(chosenOf(one) ? { offerId: chosenOf(one)?.offerId } : {}),
        })),
      },
      {
        onSuccess: ({ orders }) => {
          const [only] = orders;
          router.push(orders.length === 1 && only ? `/orders/${only.id}` : '/orders?state=draft');
          router.refresh();
        },
      },
    );
  }
  return (
    <>
      {raise.error ? (
        <div className="mb-3">
          <Notice tone="stop" announce title={raise.error.details.title}>
            {raise.error.details.detail}
          </Notice>
        </div>
      ) : null}
      <Table label="Shortfalls" stacked>
        <TableHead>
          <HeadCell>Part</HeadCell>
          <HeadCell number>Short</HeadCell>
          <HeadCell>Who waits</HeadCell>
          <HeadCell>From</HeadCell>
          <HeadCell number>Buy</HeadCell>
          <HeadCell number>Each</HeadCell>
          <HeadCell number>Together</HeadCell>
          {mayBuy ? <HeadCell>Order it</HeadCell> : null}
        </TableHead>
        <TableBody>
          {shortfalls.map((one) => {
            const purchase = chosenOf(one);
            const isLeft = left.has(one.partId);
            return (
              <TableRow key={one.partId} tone={isLeft ? 'hatched' : undefined}>
                <Cell label="Part">
                  <Link href={`/parts/${one.partId}`} className="font-semibold text-copper hover:underline">
                    {one.partName}
                  </Link>
                  <span className="block text-small text-soft">
                    {one.free} free{one.onOrder > 0 ? `, ${one.onOrder} on order` : ''}
                    {one.because === 'reorder' ? `, reorder point ${one.reorderPoint ?? 0}` : ''}
                  </span>
                </Cell>
                <Cell label="Short" number>
                  {one.short}
                </Cell>
                <Cell label="Who waits">
                  {one.waiting.length === 0 ? (
                    <span className="text-soft">only the shelf</span>
                  ) : (
                    one.waiting.slice(0, 3).map((batch) => (
                      <span key={batch.batchId} className="block">
                        <Link href={`/batches/${batch.batchId}`} className="font-mono text-copper hover:underline">
                          {batch.number}
                        </Link>{' '}
                        {batch.circuit}
                        {batch.neededBy === null ? '' : `, by ${dayText(batch.neededBy)}`}
                      </span>
                    ))
                  )}
                </Cell>
                <Cell label="From">
                  {purchase === undefined ? (
                    <span className="text-oxide">no supplier offers it</span>
                  ) : one.purchases.length === 1 || !mayBuy ? (
                    <>
                      {purchase.supplierName}{' '}
                      <span className="font-mono text-small text-soft">{purchase.supplierCode}</span>
                    </>
                  ) : (
                    <SelectField
                      label={`Supplier for ${one.partName}`}
                      hideLabel
                      value={purchase.offerId}
                      options={one.purchases.map((candidate) => ({
                        value: candidate.offerId,
                        label: `${candidate.supplierName}, ${money(candidate.totalMinor, candidate.currency)}, ${candidate.leadTimeDays} days`,
                      }))}
                      onChange={(event) => setOffers((before) => ({ ...before, [one.partId]: event.target.value }))}
                    />
                  )}
                </Cell>
                <Cell label="Buy" number>
                  {purchase?.quantity ?? '–'}
                </Cell>
                <Cell label="Each" number>
                  {purchase ? unitPriceText(purchase.unitPrice, purchase.currency) : '–'}
                </Cell>
                <Cell label="Together" number>
                  {purchase ? money(purchase.totalMinor, purchase.currency) : '–'}
                </Cell>
                {mayBuy ? (
                  <Cell label="Order it">
                    {purchase === undefined ? null : (
                      <Button size="small" kind="quiet" aria-pressed={isLeft} onClick={() => toggle(one.partId)}>
                        {isLeft ? 'Take it in' : 'Leave it out'}
                        <span className="sr-only">: {one.partName}</span>
                      </Button>
                    )}
                  </Cell>
                ) : null}
              </TableRow>
            );
          })}
        </TableBody>
      </Table>
      {mayBuy && wanted.length > 0 ? (
        <div className="mt-4 flex flex-wrap items-center justify-between gap-4">
          <ul className="text-soft">
            {[...sums.values()].map((sum) => (
              <li key={sum.supplier}>
                {sum.supplier}: <span className="font-mono text-ink">{money(sum.minor, sum.currency)}</span> for{' '}
                {sum.lines} {sum.lines === 1 ? 'line' : 'lines'}, before postage
              </li>
            ))}
          </ul>
          <Button kind="primary" busy={raise.isPending} busyWord="Raising …" onClick={send}>
            Raise {sums.size} draft {sums.size === 1 ? 'order' : 'orders'}
          </Button>
        </div>
      ) : null}
    </>
  );
}
