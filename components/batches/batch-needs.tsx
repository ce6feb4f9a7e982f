/** Line by line what a batch needs, has, and lacks. */
import Link from 'next/link';
import { LookOf } from '@/components/drawings/look-of';
import { designatorText } from '@/components/lines/line-words';
import { Glyph } from '@/components/ui/glyph';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import type { BatchNeed } from './batch-need';

export function BatchNeeds({
  needs,
  revisionId,
  underWay,
}: {
  readonly needs: readonly BatchNeed[];
  readonly revisionId: string;
  readonly underWay: boolean;
}) {
  return (
    <Table label="What the batch needs" stacked>
      <TableHead>
        <HeadCell>Designators</HeadCell>
        <HeadCell>Part</HeadCell>
        <HeadCell>Look for</HeadCell>
        <HeadCell number>Need</HeadCell>
        <HeadCell number>Reserved</HeadCell>
        <HeadCell number>Picked</HeadCell>
        <HeadCell number>Short</HeadCell>
        <HeadCell>Where</HeadCell>
      </TableHead>
      <TableBody>
        {needs.map((need) => (
          <TableRow key={need.needId}>
            <Cell label="Designators" mono>
              {designatorText(need.designators, 4) || '–'}
            </Cell>
            <Cell label="Part">
              {need.part === null ? (
                <Link
                  href={`/revisions/${revisionId}?line=${need.lineId}`}
                  className="inline-flex items-baseline gap-1.5 text-copper hover:underline"
                >
                  <Glyph name="ask" size={13} />
                  <span>{need.text}: choose a part</span>
                </Link>
              ) : (
                <Link href={`/parts/${need.part.id}`} className="hover:underline">
                  {need.part.name}
                </Link>
              )}
            </Cell>
            <Cell label="Look for">{need.part === null ? null : <LookOf part={need.part} />}</Cell>
            <Cell label="Need" number>
              {need.quantity}
            </Cell>
            <Cell label="Reserved" number>
              {need.promised}
            </Cell>
            <Cell label="Picked" number>
              {need.picked}
            </Cell>
            <Cell label="Short" number>
              {need.short > 0 && underWay ? (
                <strong className="font-semibold text-oxide">{need.short}</strong>
              ) : (
                <span className="text-soft">{need.short}</span>
              )}
            </Cell>
            <Cell label="Where">
              <span className="font-mono text-small">{need.bins.join(', ')}</span>
              {need.short > 0 && underWay ? (
                <span className="block text-small text-soft">
                  {need.free > 0 ? `${need.free} free on the shelf now` : 'none free'}
                  {need.onOrder > 0 ? `, ${need.onOrder} on order` : ''}
                </span>
              ) : null}
            </Cell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
