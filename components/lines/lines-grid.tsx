'use client';
/**
 * The lines of a revision with what the shelf has for each. Client: the grid is; a row opens its stand-in sheet by going
 * to its address, so that a line can be shared. Long lists are fetched as one scrolls.
 */
import type { ColDef, ICellRendererParams } from 'ag-grid-community';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useCallback, useMemo } from 'react';
import type { z } from 'zod';
import { LookOf } from '@/components/drawings/look-of';
import { CODE_COLUMN, DRAWN_COLUMN, NUMBER_COLUMN, TEXT_COLUMN } from '@/components/grid/columns';
import { Grid } from '@/components/grid/grid';
import type { GridSource } from '@/components/grid/grid-request';
import { EmptyState } from '@/components/ui/empty-state';
import { Verdict } from '@/components/ui/verdict';
import { callApi } from '@/lib/api/client';
import type { listLines } from '@/lib/circuits/list-lines';
import { designatorText, kindWord, percentText } from './line-words';

export type LineRow = z.output<typeof listLines.output>['rows'][number];

interface LinesQuery {
  readonly revisionId: string;
  readonly units: number;
  readonly standing?: string;
  readonly search?: string;
}

export function LinesGrid({
  rows,
  total,
  query,
}: {
  readonly rows: readonly LineRow[];
  readonly total: number;
  readonly query: LinesQuery;
}) {
  const router = useRouter();
  const pathname = usePathname();
  const parameters = useSearchParams();
  const open = useCallback(
    (row: LineRow) => {
      const next = new URLSearchParams(parameters);
      if (next.get('line') === row.id) return;
      next.set('line', row.id);
      next.delete('part');
      router.push(`${pathname}?${next}`, { scroll: false });
    },
    [router, pathname, parameters],
  );
  const all = rows.length >= total;
  const { revisionId, units, standing, search } = query;
  const source = useMemo<GridSource<LineRow>>(
    () => async (request, signal) => {
      const size = request.end - request.start;
      const page = await callApi<typeof listLines>(
        'GET /revisions/{revisionId}/lines',
        {
          revisionId,
          units,
          page: Math.floor(request.start / size) + 1,
          size,
          ...(standing === undefined ? {} : { standing: [standing as LineRow['standing']] }),
          ...(search === undefined ? {} : { search }),
        },
        { signal },
      );
      return { rows: page.rows, total: page.total };
    },
    [revisionId, units, standing, search],
  );
  const common = {
    label: 'Lines of the revision',
    rowId: (row: LineRow) => row.id,
    select: 'one' as const,
    onOpen: open,
    onSelect: (chosen: readonly LineRow[]) => chosen[0] && open(chosen[0]),
    hideOnPhone: ['look', 'need', 'free', 'shelf'],
    rowClass: (row: LineRow) => (row.fitted ? undefined : 'hatched'),
    empty: <EmptyState title="No line fits">Show all of them again, or search for something else.</EmptyState>,
  };
  return all ? (
    <Grid<LineRow> {...common} columns={COLUMNS} rows={rows} />
  ) : (
    <Grid<LineRow> {...common} columns={FETCHED_COLUMNS} source={source} />
  );
}

const shelfPart = (row: LineRow) => row.chosen ?? row.best;

const COLUMNS: readonly ColDef<LineRow>[] = [
  {
    ...CODE_COLUMN,
    minWidth: 84,
    width: 118,
    colId: 'designators',
    headerName: 'Designators',
    valueGetter: ({ data }) => (data ? designatorText(data.designators, 4) || '–' : ''),
  },
  {
    ...TEXT_COLUMN,
    colId: 'asks',
    headerName: 'What it asks for',
    flex: 1,
    minWidth: 112,
    valueGetter: ({ data }) => (data ? asksText(data) : ''),
  },
  {
    ...DRAWN_COLUMN,
    colId: 'look',
    headerName: 'Look for',
    cellRenderer: ({ data }: ICellRendererParams<LineRow>) => {
      const part = data ? shelfPart(data)?.part : undefined;
      return part ? <LookOf part={part} /> : null;
    },
  },
  { ...NUMBER_COLUMN, field: 'need', colId: 'need', headerName: 'Need', width: 84 },
  {
    ...NUMBER_COLUMN,
    colId: 'free',
    headerName: 'Free',
    width: 84,
    valueGetter: ({ data }) => (data ? (shelfPart(data)?.free ?? 0) : null),
  },
  {
    ...DRAWN_COLUMN,
    colId: 'verdict',
    headerName: 'Verdict',
    width: 116,
    cellRenderer: ({ data }: ICellRendererParams<LineRow>) => (data ? <LineVerdict row={data} /> : null),
  },
  {
    ...TEXT_COLUMN,
    colId: 'shelf',
    headerName: 'From the shelf',
    flex: 1,
    minWidth: 150,
    valueGetter: ({ data }) => (data ? shelfText(data) : ''),
  },
];

// The server keeps the order of the list; a fetched grid can't sort what it has not got.
const FETCHED_COLUMNS = COLUMNS.map((column) => ({ ...column, sortable: false, filter: false }));

function LineVerdict({ row }: { readonly row: LineRow }) {
  if (!row.fitted) return <span className="text-soft">not fitted</span>;
  if (row.question) return <Verdict verdict="ask" word="question" />;
  if (row.verdict === null) return <span className="text-soft">to buy</span>;
  return <Verdict verdict={row.verdict} />;
}

function shelfText(row: LineRow): string {
  if (!row.fitted) return '';
  const shelf = shelfPart(row);
  if (!shelf) return row.decision ? 'buy what was asked for' : 'nothing on the shelf';
  const bins = shelf.bins.slice(0, 2).map((bin) => bin.code);
  const off = row.chosen === null && row.best?.deviationPercent ? ` (${percentText(row.best.deviationPercent)})` : '';
  return `${shelf.part.name}${off}${bins.length > 0 ? `  ${bins.join(', ')}` : ''}`;
}

/** Parts that are named in words already need no kind before them. */
const NAMED_IN_WORDS = ['connector', 'led', 'pcb', 'hardware', 'switch', 'other', 'crystal', 'fuse', 'transformer'];

function asksText(row: LineRow): string {
  const text = row.spec.text || row.text;
  return NAMED_IN_WORDS.includes(row.kind) ? text : `${capital(kindWord(row.kind))} ${text}`;
}

const capital = (word: string): string => word.charAt(0).toUpperCase() + word.slice(1);
