'use client';
/** What was counted against the ledger at that moment: reasons, counting again, posting. Client: it holds the reasons. */
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { z } from 'zod';
import { Button, ButtonLink } from '@/components/ui/button';
import { SelectField } from '@/components/ui/field';
import { Glyph } from '@/components/ui/glyph';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { useCommand } from '@/lib/api/client';
import type { getCount } from '@/lib/stores/get-count';
import type { postCount } from '@/lib/stores/post-count';
import type { recountEntries } from '@/lib/stores/recount-entries';

type Entry = z.output<typeof getCount.output>['entryList'][number];

const REASONS = [
  '',
  'miscounted before',
  'used without a batch',
  'lost or thrown away',
  'damaged',
  'in the wrong bin',
  'found again',
] as const;

export function CountVariances({
  countId,
  state,
  entries,
  mayPost,
}: {
  readonly countId: string;
  readonly state: string;
  readonly entries: readonly Entry[];
  readonly mayPost: boolean;
}) {
  const router = useRouter();
  const say = useSay();
  const [reasons, setReasons] = useState<Readonly<Record<string, string>>>({});
  const post = useCommand<typeof postCount>('POST /counts/{countId}/post');
  const again = useCommand<typeof recountEntries>('POST /counts/{countId}/recount');
  const problem = post.error ?? again.error;
  const off = entries.filter((entry) => entry.variance !== 0);

  function send() {
    const given = Object.entries(reasons)
      .filter(([, reason]) => reason !== '')
      .map(([entryId, reason]) => ({ entryId, reason }));
    post.mutate({ countId, reasons: given }, { onSuccess: () => router.refresh() });
  }
  return (
    <>
      {post.data ? (
        <div className="mb-4">
          <Notice
            tone={post.data.released.length > 0 ? 'look' : 'good'}
            announce
            title={
              post.data.movements === 0
                ? 'Posted: the ledger was right'
                : `Posted: ${post.data.correctedUnits} units corrected in ${post.data.movements} lines of the ledger`
            }
            actions={post.data.released.map((one) => (
              <ButtonLink key={`${one.batchId} ${one.partName}`} href={`/batches/${one.batchId}`}>
                {one.number} lacks {one.quantity} × {one.partName} now
              </ButtonLink>
            ))}
          >
            {post.data.released.length > 0
              ? 'Units that are not there can’t stay reserved.'
              : 'No reservation had to be given up.'}
          </Notice>
        </div>
      ) : null}
      {problem ? (
        <div className="mb-4">
          <Notice tone="stop" announce title={problem.details.title}>
            {problem.details.detail}
          </Notice>
        </div>
      ) : null}
      <p className="mb-3 text-lead">
        {off.length === 0 ? (
          <span className="text-mask">
            <Glyph name="same" size={15} /> All {entries.length} figures agree with the ledger.
          </span>
        ) : (
          <>
            {off.length} of {entries.length} figures differ from the ledger at the moment of counting.
          </>
        )}
      </p>
      <Table label="What was counted" stacked>
        <TableHead>
          <HeadCell>Bin</HeadCell>
          <HeadCell>Part</HeadCell>
          <HeadCell number>Counted</HeadCell>
          <HeadCell number>Ledger</HeadCell>
          <HeadCell number>Variance</HeadCell>
          <HeadCell>By</HeadCell>
          {mayPost ? <HeadCell>Why</HeadCell> : null}
        </TableHead>
        <TableBody>
          {entries.map((entry) => (
            <TableRow key={entry.id}>
              <Cell label="Bin" mono>
                {entry.binCode}
              </Cell>
              <Cell label="Part">
                {entry.part.name}
                {entry.found ? <span className="text-amber"> found, not in the ledger</span> : null}
              </Cell>
              <Cell label="Counted" number>
                {entry.counted ?? '–'}
              </Cell>
              <Cell label="Ledger" number>
                {entry.ledger ?? '–'}
              </Cell>
              <Cell label="Variance" number>
                {entry.variance === 0 ? (
                  <span className="text-soft">0</span>
                ) : (
                  <strong className={(entry.variance ?? 0) < 0 ? 'text-oxide' : 'text-amber'}>
                    {(entry.variance ?? 0) > 0 ? '+' : '−'}
                    {Math.abs(entry.variance ?? 0)}
                  </strong>
                )}
              </Cell>
              <Cell label="By">{entry.countedBy ?? ''}</Cell>
              {mayPost ? (
                <Cell label="Why">
                  {entry.variance === 0 ? null : (
                    <span className="flex flex-wrap items-center gap-2">
                      <SelectField
                        label={`Why ${entry.part.name} in ${entry.binCode} differs`}
                        hideLabel
                        value={reasons[entry.id] ?? ''}
                        options={REASONS.map((reason) => ({
                          value: reason,
                          label: reason === '' ? 'not known' : reason,
                        }))}
                        onChange={(event) => setReasons((before) => ({ ...before, [entry.id]: event.target.value }))}
                      />
                      <Button
                        size="small"
                        kind="quiet"
                        busy={again.isPending}
                        onClick={() =>
                          again.mutate(
                            { countId, entryIds: [entry.id] },
                            {
                              onSuccess: () => {
                                say(`${entry.binCode} is counted again`);
                                router.refresh();
                              },
                            },
                          )
                        }
                      >
                        Count again
                        <span className="sr-only">
                          : {entry.part.name} in {entry.binCode}
                        </span>
                      </Button>
                    </span>
                  )}
                </Cell>
              ) : null}
            </TableRow>
          ))}
        </TableBody>
      </Table>
      {mayPost && state === 'counted' ? (
        <div className="mt-4">
          <Button kind="primary" busy={post.isPending} busyWord="Posting …" onClick={send}>
            {off.length === 0
              ? 'Post the count'
              : `Post ${off.length} ${off.length === 1 ? 'correction' : 'corrections'}`}
          </Button>
        </div>
      ) : null}
    </>
  );
}
