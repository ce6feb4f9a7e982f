import type { Metadata } from 'next';
import Link from 'next/link';
import { CircuitForm } from '@/components/circuits/circuit-form';
import { CIRCUITS_LINKS } from '@/components/circuits/circuits-links';
import { railsText } from '@/components/circuits/rails-text';
import { AreaLinks } from '@/components/shell/area-links';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pages } from '@/components/ui/pager';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { listCircuits } from '@/lib/circuits/list-circuits';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Circuits' };

const SIZE = 50;

export default async function CircuitsPage({ searchParams }: { readonly searchParams: Promise<{ page?: string }> }) {
  const page = Math.max(1, Number((await searchParams).page) || 1);
  const [{ rows, total }, me] = await Promise.all([ask(listCircuits, { page, size: SIZE }), ask(whoAmI, {})]);
  const mayWrite = me.roles.some((role) => role === 'builder' || role === 'lead');
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Circuits" links={CIRCUITS_LINKS} />}
        title="Circuits"
        facts={[
          <>
            <Strong mono>{total}</Strong> circuits
          </>,
        ]}
        actions={mayWrite ? <CircuitForm /> : undefined}
      />
      {rows.length === 0 ? (
        <EmptyState title="No circuit yet" actions={mayWrite ? <CircuitForm /> : undefined}>
          A circuit holds the parts lists of one design, revision by revision. Make one, then drop its spreadsheet on
          it.
        </EmptyState>
      ) : (
        <Table label="Circuits" stacked>
          <TableHead>
            <HeadCell>Circuit</HeadCell>
            <HeadCell>Rails</HeadCell>
            <HeadCell>Newest revision</HeadCell>
            <HeadCell number>Revisions</HeadCell>
            <HeadCell number>Batches under way</HeadCell>
          </TableHead>
          <TableBody>
            {rows.map((one) => (
              <TableRow key={one.id}>
                <Cell label="Circuit">
                  <Link href={`/circuits/${one.id}`} className="font-semibold text-copper hover:underline">
                    {one.name}
                  </Link>
                  {one.description === '' ? null : (
                    <span className="block text-small text-soft">{one.description}</span>
                  )}
                </Cell>
                <Cell label="Rails">{railsText(one.railsVolts)}</Cell>
                <Cell label="Newest">
                  {one.newestRevision === null ? (
                    <span className="text-soft">none yet</span>
                  ) : (
                    <span className="flex flex-wrap items-baseline gap-x-3">
                      <Link href={`/revisions/${one.newestRevision.id}`} className="text-copper hover:underline">
                        {one.newestRevision.name}
                      </Link>
                      <StateWord state={one.newestRevision.state} />
                      <span className="text-small text-soft">{dayText(one.newestRevision.createdAt)}</span>
                    </span>
                  )}
                </Cell>
                <Cell label="Revisions" number>
                  {one.revisions}
                </Cell>
                <Cell label="Batches" number>
                  {one.batchesUnderWay}
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      <Pages page={page} size={SIZE} total={total} what="circuits" hrefOf={(to) => `/circuits?page=${to}`} />
    </>
  );
}
