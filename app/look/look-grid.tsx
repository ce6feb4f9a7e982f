'use client';
/** The grid with rows at hand and with rows fetched. */
import { useRef } from 'react';
import { CODE_COLUMN, DRAWN_COLUMN, NUMBER_COLUMN, TEXT_COLUMN } from '@/components/grid/columns';
import { Grid, type GridHandle } from '@/components/grid/grid';
import type { GridRequest } from '@/components/grid/grid-request';
import { ResistorDrawing } from '@/components/drawings/resistor-drawing';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Section } from '@/components/ui/section';
import { useSay } from '@/components/ui/status-line';
import { Verdict } from '@/components/ui/verdict';

interface Line {
  readonly id: string;
  readonly designators: string;
  readonly asks: string;
  readonly need: number;
  readonly free: number;
}

const LINES: readonly Line[] = Array.from({ length: 12 }, (_, index) => ({
  id: String(index),
  designators: `R${index + 1}`,
  asks: `Resistor ${index + 1} kΩ 1 %`,
  need: 8,
  free: index * 17,
}));

const COLUMNS = [
  { ...CODE_COLUMN, field: 'designators' as const, headerName: 'Designators' },
  { ...TEXT_COLUMN, field: 'asks' as const, headerName: 'What it asks for', flex: 1 },
  {
    ...DRAWN_COLUMN,
    colId: 'look',
    headerName: 'Look for',
    cellRenderer: () => (
      <ResistorDrawing
        bands={['brown', 'black', 'black', 'brown', 'brown']}
        body="blue"
        name="brown, black, black, brown, brown"
      />
    ),
  },
  { ...NUMBER_COLUMN, field: 'need' as const, headerName: 'Need', width: 90 },
  { ...NUMBER_COLUMN, field: 'free' as const, headerName: 'Free', width: 90 },
  { ...DRAWN_COLUMN, colId: 'verdict', headerName: 'Verdict', cellRenderer: () => <Verdict verdict="with-effect" /> },
];

async function fetchLines(request: GridRequest) {
  const rows = Array.from({ length: Math.min(request.end, 5000) - request.start }, (_, index) => ({
    id: String(request.start + index),
    designators: `C${request.start + index}`,
    asks: 'Capacitor 100 nF',
    need: 1,
    free: 2,
  }));
  return { rows, total: 5000 };
}

export function LookGrid() {
  const say = useSay();
  const grid = useRef<GridHandle>(null);
  return (
    <>
      <Section title="Grid" actions={<Button onClick={() => grid.current?.exportCsv('lines.csv')}>Export</Button>}>
        <Grid<Line>
          ref={grid}
          label="Lines at hand"
          columns={COLUMNS}
          rows={LINES}
          rowId={(row) => row.id}
          select="one"
          hideOnPhone={['look', 'need']}
          onOpen={(row) => say(`Opened ${row.designators}`)}
          empty={<EmptyState title="No lines" />}
        />
      </Section>
      <Section title="Grid, fetched">
        <Grid<Line>
          label="Lines fetched"
          columns={COLUMNS}
          source={fetchLines}
          rowId={(row) => row.id}
          select="many"
          height={300}
          hideOnPhone={['look']}
          empty={<EmptyState title="No lines" />}
        />
      </Section>
    </>
  );
}
