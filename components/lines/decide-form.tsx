'use client';
/** A person's word on a line, with the reason. Client: it sends the decision and keeps what was typed if it is refused. */
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckboxField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { decideLine } from '@/lib/circuits/decide-line';

export function DecideForm({
  lineId,
  part,
}: {
  readonly lineId: string;
  readonly part: { readonly id: string; readonly name: string; readonly verdict: string } | null;
}) {
  const router = useRouter();
  const say = useSay();
  const [reason, setReason] = useState('');
  const [remember, setRemember] = useState(true);
  const decide = useCommand<typeof decideLine>('POST /lines/{lineId}/decision');
  const mayTake = part !== null && part.verdict !== 'refused';
  const needsReason = part !== null && (part.verdict === 'ask' || part.verdict === 'with-effect');

  function send(partId: string | null) {
    decide.mutate(
      { lineId, partId, reason, remember },
      {
        onSuccess: () => {
          say(partId === null ? 'It will be bought as asked for' : `${part?.name ?? 'It'} stands in`);
          router.refresh();
        },
      },
    );
  }
  return (
    <div className="mt-4 flex flex-col gap-2.5 border-t border-rule pt-3">
      {decide.error ? (
        <Notice tone="stop" announce title={decide.error.details.title}>
          {decide.error.details.detail}
        </Notice>
      ) : null}
      <TextField
        label="Why"
        {...(needsReason ? {} : { optional: true })}
        value={reason}
        maxLength={500}
        onChange={(event) => setReason(event.target.value)}
      />
      <CheckboxField
        label="remember it for lines alike"
        checked={remember}
        onChange={(event) => setRemember(event.target.checked)}
      />
      <div className="flex flex-wrap gap-2.5">
        {mayTake ? (
          <Button kind="primary" busy={decide.isPending} busyWord="Noting …" onClick={() => send(part.id)}>
            Take {part.name}
          </Button>
        ) : null}
        <Button busy={decide.isPending} busyWord="Noting …" onClick={() => send(null)}>
          Buy what was asked for
        </Button>
      </div>
    </div>
  );
}
