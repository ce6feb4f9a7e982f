'use client';
/**
 * One stop of a pick, big enough to read at arm's length: scan the drawer or tap when taken; fewer by the key pad; "not
 * there" tells what was, flags the drawer for a count and looks for the rest elsewhere. Client: it sends what was taken.
 */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import type { z } from 'zod';
import { LookOf } from '@/components/drawings/look-of';
import { Button } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { TextField } from '@/components/ui/field';
import { KeyPad } from '@/components/ui/key-pad';
import { Notice } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/section';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { missingAtPick } from '@/lib/stores/missing-at-pick';
import type { pickBatch } from '@/lib/stores/pick-batch';
import type { pickList } from '@/lib/stores/pick-list';
import { designatorText } from '@/components/lines/line-words';

type Stop = z.output<typeof pickList.output>['stops'][number];

export function PickSheet({
  batchId,
  stop,
  stops,
  next,
}: {
  readonly batchId: string;
  readonly stop: Stop;
  readonly stops: number;
  /** The stop after this one; null where it is the last. */
  readonly next: number | null;
}) {
  const router = useRouter();
  const say = useSay();
  const [mode, setMode] = useState<'take' | 'fewer' | 'missing'>('take');
  const [scanned, setScanned] = useState('');
  const [wrongBin, setWrongBin] = useState<string | null>(null);
  const [rightBin, setRightBin] = useState(false);
  const pick = useCommand<typeof pickBatch>('POST /batches/{batchId}/pick');
  const missing = useCommand<typeof missingAtPick>('POST /batches/{batchId}/not-there');
  const problem = pick.error ?? missing.error;
  const busy = pick.isPending || missing.isPending;

  function goOn() {
    router.push(`/batches/${batchId}/pick${next === null ? '' : `?stop=${next}`}`, { scroll: false });
    router.refresh();
  }
  function take(quantity: number) {
    let left = quantity;
    const picks = stop.lines.flatMap((line) => {
      const of = Math.min(line.take, left);
      left -= of;
      return of > 0 ? [{ reservationId: line.reservationId, quantity: of }] : [];
    });
    if (picks.length === 0) return;
    pick.mutate(
      { batchId, picks },
      {
        onSuccess: ({ openUnits }) => {
          say(openUnits === 0 ? 'The kit is picked' : `Took ${quantity} × ${stop.part.name}`);
          goOn();
        },
      },
    );
  }
  function notThere(found: number) {
    const reservationId = stop.lines[0]?.reservationId;
    if (reservationId === undefined) return;
    missing.mutate(
      { batchId, reservationId, found },
      {
        onSuccess: (told) => {
          say({
            tone: 'look',
            text: `${told.binCode} is flagged for a count. ${told.reservedInstead > 0 ? `${told.reservedInstead} found in ${told.insteadBins.join(', ')}.` : ''}${told.stillShort > 0 ? ` ${told.stillShort} are short.` : ''}`,
          });
          goOn();
        },
      },
    );
  }
  function scan(event: FormEvent) {
    event.preventDefault();
    const code = scanned.trim().toUpperCase();
    if (code === '') return;
    setRightBin(code === stop.binCode.toUpperCase());
    setWrongBin(code === stop.binCode.toUpperCase() ? null : code);
    setScanned('');
  }

  return (
    <div className="print:hidden">
      <Sheet>
        <p className="flex items-baseline justify-between gap-4 text-soft">
          <span>
            stop {stop.stop} of {stops}
          </span>
          <span className="font-mono text-title font-bold text-ink">{stop.binCode}</span>
        </p>
        <p className="mt-2 font-mono text-stop leading-tight font-semibold break-words">
          {stop.take} × {stop.part.name}
        </p>
        <p className="text-soft">
          {stop.part.description === '' ? '' : `${stop.part.description}. `}
          <span className="font-mono text-small">{designatorText(stop.designators, 6)}</span>
        </p>
        <div className="my-3">
          <LookOf part={stop.part} scale={1.8} />
        </div>
        <div className="flex flex-col gap-2">
          {stop.cautions.map((one) => (
            <Caution key={one.code} level={one.level} title={one.says} />
          ))}
        </div>
        {problem ? (
          <div className="mt-3">
            <Notice tone="stop" announce title={problem.details.title}>
              {problem.details.detail}
            </Notice>
          </div>
        ) : null}
        {mode === 'take' ? (
          <>
            <form onSubmit={scan} className="mt-4">
              <TextField
                label="Scan the bin, or tap when taken"
                mono
                value={scanned}
                error={wrongBin === null ? undefined : `That is ${wrongBin}; this stop is ${stop.binCode}.`}
                hint={rightBin ? 'The right bin.' : undefined}
                onChange={(event) => setScanned(event.target.value)}
              />
            </form>
            <div className="mt-4 grid grid-cols-[2fr_1fr] gap-2">
              <Button kind="primary" size="large" busy={busy} busyWord="Noting …" onClick={() => take(stop.take)}>
                Took {stop.take}
              </Button>
              <Button size="large" busy={busy} onClick={() => setMode('missing')}>
                Not there
              </Button>
            </div>
            <div className="mt-2 flex flex-wrap justify-between gap-2">
              <Button kind="quiet" onClick={() => setMode('fewer')}>
                Took fewer for now
              </Button>
              {next === null ? null : (
                <Button
                  kind="quiet"
                  onClick={() => router.push(`/batches/${batchId}/pick?stop=${next}`, { scroll: false })}
                >
                  Leave it for later
                </Button>
              )}
            </div>
          </>
        ) : (
          <div className="mt-4">
            <p className="mb-2 font-semibold">
              {mode === 'fewer'
                ? `How many of ${stop.take} did you take?`
                : 'How many were there? What is missing is looked for elsewhere, and the bin is flagged for a count.'}
            </p>
            <KeyPad
              key={mode}
              label={mode === 'fewer' ? 'Taken' : 'Found in the bin'}
              max={mode === 'fewer' ? stop.take : stop.take - 1}
              busy={busy}
              onEnter={(value) => (mode === 'fewer' ? take(value) : notThere(value))}
            />
            <div className="mt-2">
              <Button kind="quiet" onClick={() => setMode('take')}>
                Back
              </Button>
            </div>
          </div>
        )}
      </Sheet>
    </div>
  );
}
