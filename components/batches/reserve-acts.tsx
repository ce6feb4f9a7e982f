'use client';
/** Reserving: whole lines only, or whatever there is of each. Client: it sends the command and tells what is still short. */
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { reserveBatch } from '@/lib/stores/reserve-batch';

export function ReserveActs({
  batchId,
  number,
  canFind,
  short,
}: {
  readonly batchId: string;
  readonly number: string;
  /** Short lines of which something is free on the shelf now. */
  readonly canFind: number;
  readonly short: number;
}) {
  const router = useRouter();
  const reserve = useCommand<typeof reserveBatch>('POST /batches/{batchId}/reserve');
  const send = (allowPart: boolean) => reserve.mutate({ batchId, allowPart }, { onSuccess: () => router.refresh() });
  const told = reserve.data;
  return (
    <div className="flex flex-col gap-3">
      {reserve.error ? (
        <Notice tone="stop" announce title={reserve.error.details.title}>
          {reserve.error.details.detail}
        </Notice>
      ) : null}
      {told ? (
        <Notice
          tone={told.shortfalls.length === 0 ? 'good' : 'look'}
          announce
          title={
            told.reserved.length === 0
              ? 'Nothing more could be reserved'
              : `${told.reserved.length} ${told.reserved.length === 1 ? 'lot is' : 'lots are'} reserved for ${number}`
          }
        >
          {told.shortfalls.length === 0
            ? 'Every line is covered; the kit can be picked.'
            : `Still short: ${told.shortfalls
                .slice(0, 6)
                .map((one) => `${one.short} × ${one.partName ?? one.text}`)
                .join(', ')}${told.shortfalls.length > 6 ? ` and ${told.shortfalls.length - 6} more` : ''}.`}
        </Notice>
      ) : null}
      <div className="flex flex-wrap items-center gap-2.5">
        <Button
          kind={canFind > 0 ? 'primary' : 'secondary'}
          busy={reserve.isPending}
          busyWord="Reserving …"
          onClick={() => send(false)}
        >
          Reserve whole lines
        </Button>
        <Button busy={reserve.isPending} busyWord="Reserving …" onClick={() => send(true)}>
          Reserve what there is
        </Button>
        <span className="text-small text-soft">
          {canFind > 0
            ? `${canFind} of ${short} short lines have something free on the shelf.`
            : 'Nothing that is short lies free on the shelf now.'}
        </span>
      </div>
    </div>
  );
}
