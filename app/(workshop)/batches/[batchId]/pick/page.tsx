import type { Metadata } from 'next';
import Link from 'next/link';
import { PickSheet } from '@/components/batches/pick-sheet';
import { CabinetDrawing } from '@/components/drawings/cabinet-drawing';
import { LookOf } from '@/components/drawings/look-of';
import { designatorText } from '@/components/lines/line-words';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Glyph } from '@/components/ui/glyph';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { ProgressBar } from '@/components/ui/progress-bar';
import { Beside } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { PrintButton } from '@/components/workshop/print-button';
import { ask } from '@/lib/api/ask';
import { listBins } from '@/lib/stores/list-bins';
import { pickList } from '@/lib/stores/pick-list';

export const metadata: Metadata = { title: 'Pick list' };

const MOST_BINS = 600;

export default async function PickPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ batchId: string }>;
  readonly searchParams: Promise<{ stop?: string }>;
}) {
  const { batchId } = await params;
  const asked = Number((await searchParams).stop);
  const list = await ask(pickList, { batchId });
  const open = list.stops.filter((stop) => stop.take > 0);
  const current = list.stops.find((stop) => stop.stop === asked && stop.take > 0) ?? open[0] ?? null;
  const cabinet =
    current === null ? null : (await ask(listBins, { cabinetId: current.cabinetId, batchId, size: MOST_BINS })).rows;
  const done = list.stops.length - open.length;
  return (
    <>
      <PageTitle
        above={
          <p className="mb-1 text-small print:hidden">
            <Link href={`/batches/${batchId}`} className="text-copper hover:underline">
              {list.number}
            </Link>
          </p>
        }
        title={`Pick ${list.number}`}
        remainder={`${list.units} × ${list.circuit} ${list.revision}`}
        facts={[
          <>
            <Strong mono>{open.length}</Strong> {open.length === 1 ? 'stop' : 'stops'} to go
          </>,
        ]}
        actions={<PrintButton word="Print the pick list" />}
      />
      {list.stops.length === 0 ? (
        <EmptyState
          title="Nothing is reserved yet"
          actions={<ButtonLink href={`/batches/${batchId}`}>To the batch</ButtonLink>}
        >
          Reserve the batch first; its stops then stand here in walking order.
        </EmptyState>
      ) : current === null ? (
        <EmptyState
          title="Everything is picked"
          actions={
            <ButtonLink kind="primary" href={`/batches/${batchId}`}>
              To the batch
            </ButtonLink>
          }
        >
          All {list.stops.length} stops are taken. The kit goes to the bench.
        </EmptyState>
      ) : (
        <>
          {cabinet === null ? null : (
            <div className="mb-6 max-sm:hidden print:hidden">
              <CabinetDrawing
                label={`Cabinet ${current.cabinet}, ${current.room}`}
                columns={Math.max(...cabinet.map((bin) => bin.column))}
                bins={cabinet.map((bin) => ({
                  code: bin.code,
                  column: bin.column,
                  row: bin.row,
                  content: bin.contents[0]?.name ?? null,
                  fill: bin.fill,
                  href: `/bins?bin=${bin.id}`,
                  countDue: bin.countDueSince !== null,
                  stop: bin.lit?.stop ?? null,
                  stopDone: bin.lit?.done ?? false,
                }))}
              />
            </div>
          )}
          <div className="mb-4 sm:hidden print:hidden">
            <ProgressBar label="Stops taken" done={done} total={list.stops.length} unit="stops" />
          </div>
          <Beside
            beside={
              <PickSheet
                key={`${current.stop} ${current.take}`}
                batchId={batchId}
                stop={current}
                stops={list.stops.length}
                next={
                  open.find((stop) => stop.stop > current.stop)?.stop ??
                  open.find((stop) => stop !== current)?.stop ??
                  null
                }
              />
            }
          >
            <div className="max-lg:hidden print:block">
              <Table label="Stops in walking order" stickyHead>
                <TableHead>
                  <HeadCell number>Stop</HeadCell>
                  <HeadCell>Bin</HeadCell>
                  <HeadCell>Part</HeadCell>
                  <HeadCell>Look for</HeadCell>
                  <HeadCell>For</HeadCell>
                  <HeadCell number>Take</HeadCell>
                </TableHead>
                <TableBody>
                  {list.stops.map((stop) => (
                    <TableRow key={stop.stop} selected={stop.stop === current.stop}>
                      <Cell number>{stop.stop}</Cell>
                      <Cell mono>
                        {stop.take > 0 ? (
                          <Link
                            href={`/batches/${batchId}/pick?stop=${stop.stop}`}
                            scroll={false}
                            className="text-copper hover:underline"
                          >
                            {stop.binCode}
                          </Link>
                        ) : (
                          stop.binCode
                        )}
                      </Cell>
                      <Cell>
                        {stop.part.name}
                        {stop.cautions.map((one) => (
                          <span key={one.code} className="block text-fine text-soft">
                            {one.says}
                          </span>
                        ))}
                      </Cell>
                      <Cell>
                        <LookOf part={stop.part} />
                      </Cell>
                      <Cell mono>
                        <span className="text-small">{designatorText(stop.designators, 3)}</span>
                      </Cell>
                      <Cell number>
                        {stop.take > 0 ? (
                          stop.take
                        ) : (
                          <span className="inline-flex items-baseline gap-1 text-mask">
                            <Glyph name="same" size={13} />
                            {stop.picked} taken
                          </span>
                        )}
                      </Cell>
                    </TableRow>
                  ))}
                </TableBody>
              </Table>
            </div>
          </Beside>
        </>
      )}
    </>
  );
}
