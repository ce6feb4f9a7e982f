'use client';
/**
 * Bags into bins: each line with the bin proposed, as many bags of it as came, fewer or more than ordered explained. What
 * was posted stays on the page, with the batches that can reserve now. Client: it holds the bags until they are posted.
 */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import type { z } from 'zod';
import { LookOf } from '@/components/drawings/look-of';
import { Button, ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { NumberField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { type ChosenPart, PartChoice } from '@/components/workshop/part-choice';
import { useCommand } from '@/lib/api/client';
import type { receiveDelivery } from '@/lib/stores/receive-delivery';
import type { receiptProposal } from '@/lib/stores/receipt-proposal';
import { BinChoice, type ChosenBin } from './bin-choice';

type Expected = z.output<typeof receiptProposal.output>['lines'][number];

interface Bag {
  readonly key: number;
  readonly expected: Expected | null;
  readonly part: ChosenPart | null;
  readonly bin: ChosenBin | null;
  readonly quantity: string;
  readonly lotCode: string;
  readonly dateCode: string;
}

const bagOf = (expected: Expected | null, key: number): Bag => ({
  key,
  expected,
  part: expected === null ? null : { id: expected.part.id, name: expected.part.name },
  bin: expected?.bins[0] ? { id: expected.bins[0].binId, code: expected.bins[0].code } : null,
  quantity: expected === null ? '' : String(expected.missing),
  lotCode: '',
  dateCode: '',
});

export function ReceiveForm({
  orderId,
  expected,
}: {
  readonly orderId: string | null;
  readonly expected: readonly Expected[];
}) {
  const router = useRouter();
  const [bags, setBags] = useState<readonly Bag[]>(() =>
    expected.length === 0 ? [bagOf(null, 0)] : expected.map((line, index) => bagOf(line, index)),
  );
  const [note, setNote] = useState('');
  const [incomplete, setIncomplete] = useState<string | null>(null);
  const receive = useCommand<typeof receiveDelivery>('POST /receipts');
  const put = (key: number, change: Partial<Bag>) =>
    setBags((before) => before.map((bag) => (bag.key === key ? { ...bag, ...change } : bag)));
  const add = (line: Expected | null) =>
    setBags((before) => {
      const key = Math.max(...before.map((bag) => bag.key)) + 1;
      const bag = { ...bagOf(line, key), quantity: '' };
      const after = before.findLastIndex((one) => one.expected === line);
      return [...before.slice(0, after + 1), bag, ...before.slice(after + 1)];
    });

  function submit(event: FormEvent) {
    event.preventDefault();
    const came = bags.filter((bag) => bag.quantity.trim() !== '' && Number(bag.quantity) !== 0);
    const lacking = came.find((bag) => bag.bin === null || bag.part === null);
    if (came.length === 0 || lacking) {
      setIncomplete(
        lacking
          ? `Choose ${lacking.part === null ? 'the part' : 'the bin'} for ${lacking.part?.name ?? 'each bag'}.`
          : 'Enter how many came of at least one line.',
      );
      return;
    }
    setIncomplete(null);
    receive.mutate(
      {
        ...(orderId === null ? {} : { orderId }),
        deliveryNote: note,
        lines: came.map((bag) => ({
          ...(bag.expected === null ? {} : { orderLineId: bag.expected.orderLineId }),
          partId: bag.part?.id ?? '',
          binId: bag.bin?.id ?? '',
          quantity: Number(bag.quantity),
          ...(bag.lotCode === '' ? {} : { lotCode: bag.lotCode }),
          ...(bag.dateCode === '' ? {} : { dateCode: bag.dateCode }),
        })),
      },
      { onSuccess: () => router.refresh() },
    );
  }

  if (receive.data) {
    const { number, lots, order, waitingBatches } = receive.data;
    return (
      <Notice
        tone="good"
        announce
        title={`Receipt ${number}: ${lots.length} ${lots.length === 1 ? 'bag is' : 'bags are'} in`}
        actions={
          <>
            {waitingBatches.slice(0, 4).map((batch) => (
              <ButtonLink key={batch.id} href={`/batches/${batch.id}`}>
                {batch.number} {batch.circuit} can reserve
              </ButtonLink>
            ))}
            <ButtonLink kind="quiet" href="/receive">
              Back to what is on its way
            </ButtonLink>
          </>
        }
      >
        {order === null
          ? 'They are in their bins.'
          : order.missing === 0
            ? `Order ${order.number} is complete.`
            : `${order.missing} units of order ${order.number} are still to come.`}
        {waitingBatches.length === 0 ? '' : ' Batches were waiting for them.'}
      </Notice>
    );
  }
  return (
    <form onSubmit={submit} className="max-w-[56rem]">
      {receive.error || incomplete !== null ? (
        <div className="mb-3">
          <Notice
            tone="stop"
            announce
            title={incomplete === null ? (receive.error?.details.title ?? '') : 'Not yet posted'}
          >
            {incomplete ?? receive.error?.details.detail}
          </Notice>
        </div>
      ) : null}
      <ul className="border-t border-ink">
        {bags.map((bag, index) => {
          const isFirst = bags.findIndex((one) => one.expected === bag.expected) === index;
          const together = bags
            .filter((one) => one.expected === bag.expected)
            .reduce((sum, one) => sum + (Number(one.quantity) || 0), 0);
          return (
            <li key={bag.key} className="border-b border-rule py-3">
              {bag.expected !== null && isFirst ? (
                <div className="mb-2 flex flex-wrap items-center gap-x-5 gap-y-1">
                  <strong className="font-semibold">{bag.expected.part.name}</strong>
                  <LookOf part={bag.expected.part} />
                  <span className="font-mono text-small text-soft">{bag.expected.supplierCode}</span>
                  <span className="text-soft">
                    {bag.expected.missing} to come of {bag.expected.ordered}
                  </span>
                  {bag.expected.waiting.length > 0 ? (
                    <span className="text-amber">{bag.expected.waiting.join(', ')} waits</span>
                  ) : null}
                </div>
              ) : null}
              {bag.expected?.cautions.map((one) =>
                isFirst ? (
                  <div key={one.code} className="mb-2">
                    <Caution level={one.level} title={one.says} />
                  </div>
                ) : null,
              )}
              <div className="grid items-start gap-3 sm:grid-cols-[minmax(0,1fr)_9rem_8rem_7rem]">
                {bag.expected === null ? (
                  <div className="sm:col-span-4">
                    <PartChoice label="Part" chosen={bag.part} onChoose={(part) => put(bag.key, { part })} />
                  </div>
                ) : null}
                <BinChoice label="Into bin" chosen={bag.bin} onChoose={(bin) => put(bag.key, { bin })} />
                <NumberField
                  label="How many"
                  value={bag.quantity}
                  onChange={(event) => put(bag.key, { quantity: event.target.value })}
                />
                <TextField
                  label="Lot code"
                  optional
                  mono
                  value={bag.lotCode}
                  onChange={(event) => put(bag.key, { lotCode: event.target.value })}
                />
                <TextField
                  label="Date code"
                  optional
                  mono
                  placeholder="2638"
                  value={bag.dateCode}
                  onChange={(event) => put(bag.key, { dateCode: event.target.value })}
                />
              </div>
              {bag.expected !== null && isFirst && together !== bag.expected.missing ? (
                <p className="mt-1 text-small text-amber">
                  {together < bag.expected.missing
                    ? `${bag.expected.missing - together} stay to come.`
                    : together <= bag.expected.most
                      ? `${together - bag.expected.missing} more than ordered; the workshop allows that.`
                      : `At most ${bag.expected.most} may be received; the rest goes back.`}
                </p>
              ) : null}
              <div className="mt-1">
                <Button size="small" kind="quiet" onClick={() => add(bag.expected)}>
                  {bag.expected === null ? 'Another bag' : 'Another bag of it'}
                </Button>
              </div>
            </li>
          );
        })}
      </ul>
      <div className="mt-4 flex flex-wrap items-end gap-4">
        <div className="w-56">
          <TextField
            label="Delivery note"
            optional
            mono
            value={note}
            onChange={(event) => setNote(event.target.value)}
          />
        </div>
        <Button type="submit" kind="primary" busy={receive.isPending} busyWord="Booking …">
          Put the bags in
        </Button>
      </div>
    </form>
  );
}
