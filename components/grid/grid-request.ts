/** What a page of rows is asked for with, when the rows stay on the server. */
import type { IGetRowsParams } from 'ag-grid-community';

export interface GridSort {
  readonly column: string;
  readonly direction: 'asc' | 'desc';
}

export interface GridFilter {
  readonly column: string;
  /** The grid's own word: `contains`, `equals`, `lessThan`, `inRange`, `blank` … */
  readonly type: string;
  readonly value: string | number | null;
  /** The upper end where `type` is `inRange`. */
  readonly to: string | number | null;
}

export interface GridRequest {
  /** Counted from 0; `end` is not included. */
  readonly start: number;
  readonly end: number;
  readonly sort: readonly GridSort[];
  readonly filters: readonly GridFilter[];
}

export interface GridPage<Row> {
  readonly rows: readonly Row[];
  /** All rows that match; null where the server does not count them, then a page shorter than asked is the last. */
  readonly total: number | null;
}

export type GridSource<Row> = (request: GridRequest, signal: AbortSignal) => Promise<GridPage<Row>>;

export function gridRequest(
  params: Pick<IGetRowsParams, 'startRow' | 'endRow' | 'sortModel' | 'filterModel'>,
): GridRequest {
  const model: unknown = params.filterModel;
  const filters = isRecord(model)
    ? Object.entries(model).flatMap(([column, filter]) => readFilter(column, filter))
    : [];
  return {
    start: params.startRow,
    end: params.endRow,
    sort: params.sortModel.map(({ colId, sort }) => ({ column: colId, direction: sort === 'desc' ? 'desc' : 'asc' })),
    filters,
  };
}

/** The whole of a request as query parameters: `start`, `end`, `sort=-free,code`, `filter=code:contains:TL`. */
export function gridRequestParameters(request: GridRequest): URLSearchParams {
  const parameters = new URLSearchParams({ start: String(request.start), end: String(request.end) });
  if (request.sort.length > 0) {
    parameters.set(
      'sort',
      request.sort.map(({ column, direction }) => (direction === 'desc' ? `-${column}` : column)).join(','),
    );
  }
  for (const { column, type, value, to } of request.filters) {
    parameters.append('filter', [column, type, value ?? '', ...(to === null ? [] : [to])].join(':'));
  }
  return parameters;
}

function readFilter(column: string, filter: unknown): readonly GridFilter[] {
  if (!isRecord(filter)) return [];
  // Two conditions on one column; both must hold, since the columns allow no other joining.
  if (Array.isArray(filter.conditions)) return filter.conditions.flatMap((one: unknown) => readFilter(column, one));
  if (typeof filter.type !== 'string') return [];
  return [
    {
      column,
      type: filter.type,
      value: plain(filter.filter ?? filter.dateFrom),
      to: plain(filter.filterTo ?? filter.dateTo),
    },
  ];
}

function plain(value: unknown): string | number | null {
  return typeof value === 'string' || typeof value === 'number' ? value : null;
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
