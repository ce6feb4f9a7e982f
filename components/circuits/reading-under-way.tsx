'use client';
/** A long list being read by a job: how far it is, and how to stop it. Client: it asks again every second. */
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { ProgressBar } from '@/components/ui/progress-bar';
import { useAnswer, useCommand } from '@/lib/api/client';
import type { cancelReading, getUpload } from '@/lib/circuits/get-upload';

const ASK_EVERY_MS = 1000;

export function ReadingUnderWay({
  uploadId,
  circuitId,
  mayStop,
}: {
  readonly uploadId: string;
  readonly circuitId: string;
  readonly mayStop: boolean;
}) {
  const router = useRouter();
  const { data, error } = useAnswer<typeof getUpload>(
    'GET /uploads/{uploadId}',
    { uploadId },
    { refetchIntervalMs: ASK_EVERY_MS },
  );
  const stop = useCommand<typeof cancelReading>('POST /uploads/{uploadId}/cancel');
  const state = data?.progress?.state;
  useEffect(() => {
    if (state === 'done') router.refresh();
  }, [state, router]);

  if (error) return <Notice tone="stop">{error.details.detail}</Notice>;
  if (state === 'failed' || state === 'cancelled') {
    return (
      <Notice
        tone={state === 'failed' ? 'stop' : 'look'}
        announce
        title={state === 'failed' ? 'The list could not be read' : 'Reading was stopped'}
        actions={<ButtonLink href={`/circuits/${circuitId}`}>Back to the circuit</ButtonLink>}
      >
        The file is kept with the circuit; nothing else was changed.
      </Notice>
    );
  }
  const total = data?.progress?.total ?? null;
  const share = total === null || total === 0 ? 0 : Math.round(((data?.progress?.done ?? 0) / total) * 100);
  return (
    <div className="max-w-[36rem]">
      <ProgressBar
        label={data?.progress?.what ?? 'Reading the list'}
        done={share}
        total={100}
        unit="percent"
        note="It goes on when you leave this page; come back any time."
      />
      {mayStop ? (
        <div className="mt-3">
          <Button busy={stop.isPending} busyWord="Stopping …" onClick={() => stop.mutate({ uploadId })}>
            Stop reading
          </Button>
        </div>
      ) : null}
      {stop.error ? <Notice tone="stop">{stop.error.details.detail}</Notice> : null}
    </div>
  );
}
