/** Kinds of column, spread into a definition: `{ ...NUMBER_COLUMN, field: 'free', headerName: 'Free' }`. */
import type { ColDef } from 'ag-grid-community';

type Kind = Pick<ColDef, 'cellClass' | 'headerClass' | 'filter' | 'minWidth' | 'comparator' | 'sortable' | 'width'>;

export const TEXT_COLUMN: Kind = { filter: 'agTextColumnFilter', minWidth: 120 };

/** Designators, codes, part numbers, values. Sorted so that R2 comes before R10. */
export const CODE_COLUMN: Kind = {
  cellClass: 'grid-code',
  filter: 'agTextColumnFilter',
  minWidth: 90,
  width: 140,
  comparator: (a: unknown, b: unknown) => naturally.compare(String(a ?? ''), String(b ?? '')),
};

export const NUMBER_COLUMN: Kind = {
  cellClass: 'grid-number',
  headerClass: 'ag-right-aligned-header',
  filter: 'agNumberColumnFilter',
  minWidth: 76,
  width: 100,
};

/** Drawings and verdicts: nothing that a text filter could search. */
export const DRAWN_COLUMN: Kind = {
  cellClass: 'grid-drawn',
  filter: false,
  minWidth: 110,
  width: 140,
  sortable: false,
};

const naturally = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });
