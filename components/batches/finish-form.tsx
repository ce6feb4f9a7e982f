'use client';
/** The end of a batch: what is left over goes back, line by line. Client: it holds the figures until they are sent. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { designatorText } from '@/components/lines/line-words';
import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { finishBatch } from '@/lib/stores/finish-batch';
import type { BatchNeed } from './batch-need';

export function FinishForm({
  batchId,
  number,
  needs,
}: {
  readonly batchId: string;
  readonly number: string;
  readonly needs: readonly BatchNeed[];
}) {
  const router = useRouter();
  const say = useSay();
  const [left, setLeft] = useState<Readonly<Record<string, string>>>({});
  const finish = useCommand<typeof finishBatch>('POST /batches/{batchId}/finish');

  function submit(event: FormEvent) {
    event.preventDefault();
    const returns = Object.entries(left)
      .map(([needId, text]) => ({ needId, quantity: Number(text) }))
      .filter((one) => one.quantity !== 0);
    finish.mutate(
      { batchId, returns },
      {
        onSuccess: ({ returnedUnits }) => {
          say(`${number} is finished${returnedUnits > 0 ? `; ${returnedUnits} units went back` : ''}`);
          router.refresh();
        },
      },
    );
  }
  return (
    <form onSubmit={submit} className="max-w-[44rem]">
      {finish.error ? (
        <div className="mb-3">
          <Notice tone="stop" announce title={finish.error.details.title}>
            {finish.error.details.detail}
          </Notice>
        </div>
      ) : null}
      <details>
        <summary className="min-h-9 cursor-pointer font-semibold text-copper max-sm:min-h-11">
          Something is left over
        </summary>
        <ul className="mt-2 border-t border-rule">
          {needs.map((need) => (
            <li
              key={need.needId}
              className="flex flex-wrap items-center justify-between gap-3 border-b border-hair py-1.5"
            >
              <span className="min-w-0 flex-1">
                {need.part?.name ?? need.text}
                <span className="font-mono text-small text-soft"> {designatorText(need.designators, 3)}</span>
                <span className="block text-small text-soft">{need.picked} picked</span>
              </span>
              <span className="w-28">
                <NumberField
                  label={`Left over of ${need.part?.name ?? need.text}`}
                  hideLabel
                  placeholder="0"
                  value={left[need.needId] ?? ''}
                  onChange={(event) => setLeft((before) => ({ ...before, [need.needId]: event.target.value }))}
                />
              </span>
            </li>
          ))}
        </ul>
      </details>
      <div className="mt-3">
        <Button type="submit" kind="primary" busy={finish.isPending} busyWord="Finishing …">
          Finish the batch
        </Button>
      </div>
    </form>
  );
}
