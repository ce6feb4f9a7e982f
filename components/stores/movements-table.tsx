/** Lines of the ledger: what moved, where, how many, why, and what caused it. */
import Link from 'next/link';
import type { z } from 'zod';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { clockText, dayText } from '@/components/workshop/clock-time';
import type { listMovements } from '@/lib/stores/list-movements';

export type MovementShown = z.output<typeof listMovements.output>['rows'][number];

const KINDS: Readonly<Record<string, string>> = {
  receipt: 'received',
  pick: 'picked',
  return: 'returned',
  move: 'moved',
  count: 'counted',
  scrap: 'scrapped',
  opening: 'opening stock',
};
export const movementWord = (kind: string): string => KINDS[kind] ?? kind;

export function MovementsTable({
  movements,
  label,
  without = [],
}: {
  readonly movements: readonly MovementShown[];
  readonly label: string;
  readonly without?: readonly ('part' | 'bin')[];
}) {
  return (
    <Table label={label} stacked>
      <TableHead>
        <HeadCell>When</HeadCell>
        <HeadCell>What</HeadCell>
        {without.includes('part') ? null : <HeadCell>Part</HeadCell>}
        {without.includes('bin') ? null : <HeadCell>Bin</HeadCell>}
        <HeadCell number>Units</HeadCell>
        <HeadCell number>In the lot after</HeadCell>
        <HeadCell>Because of</HeadCell>
        <HeadCell>Who</HeadCell>
      </TableHead>
      <TableBody>
        {movements.map((one) => (
          <TableRow key={one.id}>
            <Cell label="When">
              <span className="whitespace-nowrap">
                {dayText(one.at)} <span className="font-mono text-small">{clockText(one.at)}</span>
              </span>
            </Cell>
            <Cell label="What">{movementWord(one.kind)}</Cell>
            {without.includes('part') ? null : (
              <Cell label="Part">
                <Link href={`/parts/${one.partId}`} className="text-copper hover:underline">
                  {one.partName}
                </Link>
              </Cell>
            )}
            {without.includes('bin') ? null : (
              <Cell label="Bin" mono>
                <Link href={`/bins?bin=${one.binId}`} className="text-copper hover:underline">
                  {one.binCode}
                </Link>
              </Cell>
            )}
            <Cell label="Units" number>
              <span className={one.quantity < 0 ? 'text-oxide' : 'text-mask'}>
                {one.quantity < 0 ? '−' : '+'}
                {Math.abs(one.quantity)}
              </span>
            </Cell>
            <Cell label="After" number>
              {one.balanceAfter}
            </Cell>
            <Cell label="Because of">
              {one.causeHref === null ? (
                one.cause
              ) : (
                <Link href={one.causeHref} className="text-copper hover:underline">
                  {one.cause}
                </Link>
              )}
              {one.reason === '' ? null : <span className="block text-small text-soft">{one.reason}</span>}
            </Cell>
            <Cell label="Who">{one.person ?? 'Ohmstead'}</Cell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
