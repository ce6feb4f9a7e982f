import type { Metadata } from 'next';
import Link from 'next/link';
import { AddRevision } from '@/components/circuits/add-revision';
import { CIRCUITS_LINKS } from '@/components/circuits/circuits-links';
import { nextRevisionName } from '@/components/circuits/next-revision-name';
import { railsText } from '@/components/circuits/rails-text';
import { RejectedLists } from '@/components/circuits/rejected-lists';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { getCircuit } from '@/lib/circuits/get-circuit';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Circuit' };

export default async function CircuitPage({ params }: { readonly params: Promise<{ circuitId: string }> }) {
  const { circuitId } = await params;
  const [circuit, me] = await Promise.all([ask(getCircuit, { circuitId }), ask(whoAmI, {})]);
  const mayWrite = me.roles.some((role) => role === 'builder' || role === 'lead');
  const [newest, before] = circuit.revisions;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Circuits" links={CIRCUITS_LINKS} />}
        title={circuit.name}
        facts={[railsText(circuit.railsVolts), circuit.description === '' ? null : circuit.description]}
      />
      <Section
        title="Revisions"
        actions={
          newest && before ? (
            <ButtonLink href={`/revisions/${newest.id}/compare?with=${before.id}`}>
              Compare {newest.name} with {before.name}
            </ButtonLink>
          ) : undefined
        }
      >
        {circuit.revisions.length === 0 ? (
          <EmptyState title="No parts list yet">
            Drop its spreadsheet below; every line comes out understood.
          </EmptyState>
        ) : (
          <Table label={`Revisions of ${circuit.name}`} stacked>
            <TableHead>
              <HeadCell>Revision</HeadCell>
              <HeadCell>State</HeadCell>
              <HeadCell number>Lines</HeadCell>
              <HeadCell number>Open questions</HeadCell>
              <HeadCell>From</HeadCell>
              <HeadCell>By</HeadCell>
            </TableHead>
            <TableBody>
              {circuit.revisions.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="Revision">
                    <Link href={`/revisions/${one.id}`} className="font-semibold text-copper hover:underline">
                      {one.name}
                    </Link>
                  </Cell>
                  <Cell label="State">
                    <StateWord state={one.state} />
                  </Cell>
                  <Cell label="Lines" number>
                    {one.lines}
                  </Cell>
                  <Cell label="Questions" number>
                    {one.openQuestions === 0 ? (
                      <span className="text-soft">0</span>
                    ) : (
                      <Link href={`/revisions/${one.id}/import`} className="text-copper hover:underline">
                        {one.openQuestions}
                      </Link>
                    )}
                  </Cell>
                  <Cell label="From">
                    <span className="font-mono text-small break-all">{one.fileName ?? 'a copy'}</span>
                  </Cell>
                  <Cell label="By">
                    {one.createdBy}, {dayText(one.createdAt)}
                  </Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        )}
      </Section>
      {mayWrite ? (
        <Section title="New revision" remainder="from a parts list">
          <AddRevision circuitId={circuit.id} nextName={nextRevisionName(circuit.revisions.map((one) => one.name))} />
        </Section>
      ) : null}
      {circuit.rejected.length > 0 ? <RejectedLists rejected={circuit.rejected} /> : null}
      {circuit.batches.length > 0 ? (
        <Section title="Batches">
          <Table label={`Batches of ${circuit.name}`} stacked>
            <TableHead>
              <HeadCell>Batch</HeadCell>
              <HeadCell>Revision</HeadCell>
              <HeadCell number>Units</HeadCell>
              <HeadCell>State</HeadCell>
              <HeadCell>Needed by</HeadCell>
            </TableHead>
            <TableBody>
              {circuit.batches.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="Batch" mono>
                    <Link href={`/batches/${one.id}`} className="text-copper hover:underline">
                      {one.number}
                    </Link>
                  </Cell>
                  <Cell label="Revision">{one.revisionName}</Cell>
                  <Cell label="Units" number>
                    {one.units}
                  </Cell>
                  <Cell label="State">
                    <StateWord state={one.state} />
                  </Cell>
                  <Cell label="Needed by">{one.neededBy === null ? 'no day set' : dayText(one.neededBy)}</Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        </Section>
      ) : null}
    </>
  );
}
