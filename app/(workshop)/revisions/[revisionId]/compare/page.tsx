import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { designatorText } from '@/components/lines/line-words';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { ask } from '@/lib/api/ask';
import { compareRevisions } from '@/lib/circuits/compare-revisions';

export const metadata: Metadata = { title: 'Two revisions' };

const CHANGES = {
  added: 'added',
  gone: 'gone',
  part: 'another part',
  quantity: 'another quantity',
  fitted: 'fitted or not',
} as const;

export default async function ComparePage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ revisionId: string }>;
  readonly searchParams: Promise<{ with?: string }>;
}) {
  const { revisionId } = await params;
  const { with: other } = await searchParams;
  if (other === undefined) notFound();
  const { before, after, byDesignator, byPart } = await ask(compareRevisions, { revisionId, with: other });
  const said = (line: (typeof byDesignator)[number]['after']) =>
    line === null ? '–' : `${line.quantity} × ${line.text}${line.fitted ? '' : ', not fitted'}`;
  return (
    <>
      <PageTitle
        above={
          <p className="mb-1 text-small">
            <Link href={`/revisions/${after.id}`} className="text-copper hover:underline">
              Revision {after.name}
            </Link>
          </p>
        }
        title={`From ${before.name} to ${after.name}`}
        facts={[
          <>
            <Strong mono>{byDesignator.length}</Strong> places differ
          </>,
          <>
            <Strong mono>{byPart.length}</Strong> parts in another number
          </>,
        ]}
      />
      {byDesignator.length === 0 && byPart.length === 0 ? (
        <EmptyState title="No difference">Both ask for the same parts in the same places.</EmptyState>
      ) : (
        <>
          <Section title="By designator">
            <Table label="Differences by designator" stacked>
              <TableHead>
                <HeadCell>Designators</HeadCell>
                <HeadCell>What changed</HeadCell>
                <HeadCell>{before.name}</HeadCell>
                <HeadCell>{after.name}</HeadCell>
              </TableHead>
              <TableBody>
                {byDesignator.map((one, index) => (
                  <TableRow key={index}>
                    <Cell label="Designators" mono>
                      {designatorText(one.designators)}
                    </Cell>
                    <Cell label="Changed">{CHANGES[one.change]}</Cell>
                    <Cell label={before.name} mono>
                      {said(one.before)}
                    </Cell>
                    <Cell label={after.name} mono>
                      {said(one.after)}
                    </Cell>
                  </TableRow>
                ))}
              </TableBody>
            </Table>
          </Section>
          <Section title="By part" remainder="units in one circuit">
            <Table label="Differences by part" stacked>
              <TableHead>
                <HeadCell>Part</HeadCell>
                <HeadCell number>{before.name}</HeadCell>
                <HeadCell number>{after.name}</HeadCell>
                <HeadCell number>More or fewer</HeadCell>
              </TableHead>
              <TableBody>
                {byPart.map((one) => (
                  <TableRow key={one.text}>
                    <Cell label="Part" mono>
                      {one.text}
                    </Cell>
                    <Cell label={before.name} number>
                      {one.before}
                    </Cell>
                    <Cell label={after.name} number>
                      {one.after}
                    </Cell>
                    <Cell label="Change" number>
                      {one.after > one.before ? '+' : '−'}
                      {Math.abs(one.after - one.before)}
                    </Cell>
                  </TableRow>
                ))}
              </TableBody>
            </Table>
          </Section>
        </>
      )}
    </>
  );
}
