import type { Metadata } from 'next';
import Link from 'next/link';
import { OpenCountForm } from '@/components/stores/open-count-form';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { listBins } from '@/lib/stores/list-bins';
import { listCounts } from '@/lib/stores/list-counts';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Counts' };

export default async function CountsPage() {
  const [counts, due, me] = await Promise.all([
    ask(listCounts, { size: 50 }),
    ask(listBins, { due: 'true', size: 100 }),
    ask(whoAmI, {}),
  ]);
  const mayCount = me.roles.some((role) => role === 'storekeeper' || role === 'lead');
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title="Counts"
        facts={['Counted blind: what the ledger says is shown when everything is counted.']}
      />
      {mayCount ? (
        <Section title="Open a count" remainder={due.total > 0 ? `${due.total} bins are due` : 'no bin is due'}>
          <OpenCountForm
            due={due.rows.map((bin) => ({
              id: bin.id,
              code: bin.code,
              why: bin.countDueReason ?? 'planned',
              content: bin.contents.map((one) => one.name).join(', '),
            }))}
          />
        </Section>
      ) : null}
      <Section title="Counts">
        {counts.rows.length === 0 ? (
          <EmptyState title="Nothing was counted yet">The first count stands here with what it found.</EmptyState>
        ) : (
          <Table label="Counts" stacked>
            <TableHead>
              <HeadCell>Count</HeadCell>
              <HeadCell>State</HeadCell>
              <HeadCell>Why</HeadCell>
              <HeadCell number>Bins done</HeadCell>
              <HeadCell>Opened</HeadCell>
              <HeadCell>Posted</HeadCell>
            </TableHead>
            <TableBody>
              {counts.rows.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="Count" mono>
                    <Link href={`/counts/${one.id}`} className="font-semibold text-copper hover:underline">
                      {one.number}
                    </Link>
                  </Cell>
                  <Cell label="State">
                    <StateWord state={one.state} />
                  </Cell>
                  <Cell label="Why">{one.reason}</Cell>
                  <Cell label="Bins" number>
                    {one.binsDone} of {one.bins}
                  </Cell>
                  <Cell label="Opened">
                    {one.openedBy}, {dayText(one.createdAt)}
                  </Cell>
                  <Cell label="Posted">
                    {one.postedAt === null ? '–' : `${one.postedBy ?? ''}, ${dayText(one.postedAt)}`}
                  </Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        )}
      </Section>
    </>
  );
}
