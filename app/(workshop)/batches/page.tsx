import type { Metadata } from 'next';
import Link from 'next/link';
import { CIRCUITS_LINKS } from '@/components/circuits/circuits-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pages } from '@/components/ui/pager';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { listBatches } from '@/lib/stores/list-batches';

export const metadata: Metadata = { title: 'Batches' };

const SIZE = 50;
const UNDER_WAY = ['planned', 'reserved', 'picking', 'kitted'] as const;
const ENDED = ['finished', 'cancelled'] as const;
const KITTED = ['kitted'] as const;

export default async function BatchesPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ page?: string; show?: string }>;
}) {
  const { page: asked, show } = await searchParams;
  const page = Math.max(1, Number(asked) || 1);
  const ended = show === 'ended';
  const states = ended ? ENDED : show === 'kitted' ? KITTED : UNDER_WAY;
  const { rows, total } = await ask(listBatches, {
    page,
    size: SIZE,
    state: [...states],
    sort: ended ? 'newest' : 'needed',
  });
  const address = (to: number) => `/batches?page=${to}${show === undefined ? '' : `&show=${encodeURIComponent(show)}`}`;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Circuits" links={CIRCUITS_LINKS} />}
        title="Batches"
        remainder={ended ? 'that are over' : show === 'kitted' ? 'whose kit is complete' : 'under way'}
        facts={[
          <>
            <Strong mono>{total}</Strong> batches
          </>,
        ]}
        actions={
          <ButtonLink href={ended ? '/batches' : '/batches?show=ended'}>
            {ended ? 'Those under way' : 'Those that are over'}
          </ButtonLink>
        }
      />
      {rows.length === 0 ? (
        <EmptyState title="No batch here" actions={<ButtonLink href="/circuits">Choose a circuit</ButtonLink>}>
          A batch is planned from a frozen revision: so many units, by such a day.
        </EmptyState>
      ) : (
        <Table label="Batches" stacked>
          <TableHead>
            <HeadCell>Batch</HeadCell>
            <HeadCell>Circuit</HeadCell>
            <HeadCell number>Units</HeadCell>
            <HeadCell>State</HeadCell>
            <HeadCell>Needed by</HeadCell>
            <HeadCell number>Lines covered</HeadCell>
            <HeadCell number>Stops to pick</HeadCell>
          </TableHead>
          <TableBody>
            {rows.map((one) => (
              <TableRow key={one.id}>
                <Cell label="Batch" mono>
                  <Link href={`/batches/${one.id}`} className="font-semibold text-copper hover:underline">
                    {one.number}
                  </Link>
                </Cell>
                <Cell label="Circuit">
                  {one.circuit} <span className="text-soft">{one.revision}</span>
                </Cell>
                <Cell label="Units" number>
                  {one.units}
                </Cell>
                <Cell label="State">
                  <StateWord state={one.state} />
                </Cell>
                <Cell label="Needed by">
                  {one.neededBy === null ? <span className="text-soft">no day set</span> : dayText(one.neededBy)}
                </Cell>
                <Cell label="Covered" number>
                  {one.covered} of {one.needs}
                </Cell>
                <Cell label="Stops" number>
                  {one.stopsOpen}
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      <Pages page={page} size={SIZE} total={total} what="batches" hrefOf={address} />
    </>
  );
}
