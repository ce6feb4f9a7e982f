import type { Metadata } from 'next';
import Link from 'next/link';
import { PURCHASING_LINKS } from '@/components/purchasing/purchasing-links';
import { ShortfallList } from '@/components/purchasing/shortfall-list';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { ask } from '@/lib/api/ask';
import { listShortfalls } from '@/lib/purchasing/shortfalls';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Shortfalls' };

export default async function ShortfallsPage() {
  const [{ shortfalls, undecided, totals }, me] = await Promise.all([ask(listShortfalls, {}), ask(whoAmI, {})]);
  const mayBuy = me.roles.some((role) => role === 'buyer' || role === 'lead');
  const waits = new Set(shortfalls.flatMap((one) => one.waiting.map((batch) => batch.batchId)));
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Purchasing" links={PURCHASING_LINKS} />}
        title="Shortfalls"
        facts={[
          <>
            <Strong mono>{shortfalls.length}</Strong> parts are short
          </>,
          <>
            <Strong mono>{waits.size}</Strong> {waits.size === 1 ? 'batch waits' : 'batches wait'}
          </>,
          totals.length > 0 ? (
            <>
              about <Strong mono>{totals.map((one) => one.text).join(' + ')}</Strong> at the cheapest, without postage
            </>
          ) : null,
        ]}
      />
      {shortfalls.length === 0 ? (
        <EmptyState title="Nothing is short" actions={<ButtonLink href="/orders">See the orders</ButtonLink>}>
          Every batch under way is covered by the shelf or by what is on order, and no bin is below its reorder point.
        </EmptyState>
      ) : (
        <ShortfallList shortfalls={shortfalls} mayBuy={mayBuy} />
      )}
      {undecided.length > 0 ? (
        <Section title="Lines without a part" remainder="a builder has to choose before they can be bought">
          <Table label="Lines without a part" stacked>
            <TableHead>
              <HeadCell>Batch</HeadCell>
              <HeadCell>Designators</HeadCell>
              <HeadCell>Asks for</HeadCell>
              <HeadCell number>Units</HeadCell>
            </TableHead>
            <TableBody>
              {undecided.map((one) => (
                <TableRow key={`${one.batchId} ${one.lineId}`}>
                  <Cell label="Batch">
                    <Link href={`/batches/${one.batchId}`} className="font-mono text-copper hover:underline">
                      {one.number}
                    </Link>{' '}
                    {one.circuit}
                  </Cell>
                  <Cell label="Designators" mono>
                    {one.designators.slice(0, 5).join(', ')}
                  </Cell>
                  <Cell label="Asks for">
                    <Link
                      href={`/revisions/${one.revisionId}?line=${one.lineId}`}
                      className="text-copper hover:underline"
                    >
                      {one.text}
                    </Link>
                  </Cell>
                  <Cell label="Units" number>
                    {one.quantity}
                  </Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        </Section>
      ) : null}
    </>
  );
}
