'use client';
/**
 * One drawer of a blind count: part by part on a key pad, what else was found, and that nothing else lies there. Client:
 * it sends each figure; nothing here says what the ledger expects.
 */
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { LookOf, type LookedFor } from '@/components/drawings/look-of';
import { Button } from '@/components/ui/button';
import { KeyPad } from '@/components/ui/key-pad';
import { Notice } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/section';
import { useSay } from '@/components/ui/status-line';
import { type ChosenPart, PartChoice } from '@/components/workshop/part-choice';
import { useCommand } from '@/lib/api/client';
import type { enterCounts } from '@/lib/stores/enter-counts';

interface ToCount {
  readonly id: string;
  readonly part: LookedFor & { readonly id: string; readonly stockUnit: string };
  readonly attempt: number;
}

export function CountEntry({
  countId,
  bin,
  others,
  expected,
}: {
  readonly countId: string;
  readonly bin: { readonly binId: string; readonly code: string; readonly looked: boolean };
  /** Codes of the other bins still open. */
  readonly others: readonly string[];
  readonly expected: readonly ToCount[];
}) {
  const router = useRouter();
  const say = useSay();
  const [finding, setFinding] = useState(false);
  const [found, setFound] = useState<ChosenPart | null>(null);
  const enter = useCommand<typeof enterCounts>('POST /counts/{countId}/entries');
  const [current] = expected;

  function send(partId: string, name: string, counted: number) {
    enter.mutate(
      { countId, entries: [{ binId: bin.binId, partId, counted }] },
      {
        onSuccess: ({ open, binsOpen, state }) => {
          say(
            state === 'counted'
              ? 'Everything is counted'
              : `${counted} × ${name} noted${open + binsOpen === 0 ? '' : ''}`,
          );
          setFinding(false);
          setFound(null);
          router.refresh();
        },
      },
    );
  }
  function nothingElse() {
    enter.mutate({ countId, emptyBinIds: [bin.binId] }, { onSuccess: () => router.refresh() });
  }

  return (
    <>
      <Sheet>
        <p className="flex items-baseline justify-between gap-4">
          <span className="text-soft">bin</span>
          <span className="font-mono text-stop font-bold">{bin.code}</span>
        </p>
        {enter.error ? (
          <div className="my-3">
            <Notice tone="stop" announce title={enter.error.details.title}>
              {enter.error.details.detail}
            </Notice>
          </div>
        ) : null}
        {finding ? (
          <>
            <p className="mt-2 mb-2 font-semibold">What else lies there?</p>
            <PartChoice label="Part" chosen={found} onChoose={setFound} />
            {found === null ? null : (
              <div className="mt-3">
                <KeyPad
                  label={`Units of ${found.name}`}
                  busy={enter.isPending}
                  onEnter={(value) => send(found.id, found.name, value)}
                />
              </div>
            )}
            <div className="mt-3">
              <Button kind="quiet" onClick={() => setFinding(false)}>
                Back
              </Button>
            </div>
          </>
        ) : current === undefined ? (
          <div className="mt-3 flex flex-col gap-2.5">
            <p>Nothing of a known part is left to count here. Look into the drawer:</p>
            <Button kind="primary" size="large" wide busy={enter.isPending} onClick={nothingElse}>
              Nothing else lies there
            </Button>
            <Button size="large" wide onClick={() => setFinding(true)}>
              Something else lies there
            </Button>
          </div>
        ) : (
          <>
            <p className="mt-2 font-mono text-title leading-tight font-semibold break-words">{current.part.name}</p>
            {current.attempt > 0 ? <p className="text-amber">Count it once more.</p> : null}
            <div className="my-3">
              <LookOf part={current.part} scale={1.6} />
            </div>
            <KeyPad
              key={current.id}
              label={`Units of ${current.part.name}`}
              busy={enter.isPending}
              {...(current.part.stockUnit === 'piece' ? {} : { unit: current.part.stockUnit })}
              onEnter={(value) => send(current.part.id, current.part.name, value)}
            />
            <div className="mt-3 flex flex-wrap justify-between gap-2">
              <Button kind="quiet" onClick={() => setFinding(true)}>
                Something else lies there
              </Button>
              {expected.length > 1 ? (
                <span className="text-soft">
                  {expected.length - 1} more part{expected.length > 2 ? 's' : ''} here
                </span>
              ) : null}
            </div>
          </>
        )}
      </Sheet>
      {others.length > 0 ? (
        <nav aria-label="Other bins of the count" className="mt-4">
          <p className="text-small text-soft">Still to count</p>
          <ul className="flex flex-wrap gap-1.5">
            {others.slice(0, 24).map((code) => (
              <li key={code}>
                <Link
                  href={`/counts/${countId}?bin=${code}`}
                  className="inline-flex min-h-9 items-center border border-edge px-2 font-mono text-small hover:bg-copper-wash max-sm:min-h-11"
                >
                  {code}
                </Link>
              </li>
            ))}
          </ul>
        </nav>
      ) : null}
    </>
  );
}
