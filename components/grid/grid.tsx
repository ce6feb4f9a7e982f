'use client';
/**
 * The one grid: rows at hand, or fetched page by page as one scrolls. Client: AG Grid is. It brings the look, a name for
 * screen readers, the keyboard (arrows, Enter opens, Space selects), our words for emptiness, and a safe CSV export.
 */
import {
  CellStyleModule,
  ClientSideRowModelModule,
  type ColDef,
  ColumnApiModule,
  ColumnAutoSizeModule,
  CsvExportModule,
  DateFilterModule,
  enableDevValidations,
  type GridApi,
  type IDatasource,
  InfiniteRowModelModule,
  ModuleRegistry,
  NumberFilterModule,
  QuickFilterModule,
  RenderApiModule,
  RowAutoHeightModule,
  RowSelectionModule,
  RowStyleModule,
  TextFilterModule,
} from 'ag-grid-community';
import { AgGridReact } from 'ag-grid-react';
import {
  type ReactNode,
  type Ref,
  useEffect,
  useImperativeHandle,
  useMemo,
  useState,
  useSyncExternalStore,
} from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { type GridSource, gridRequest } from './grid-request';
import { DENSE_ROW_HEIGHT_PX, gridTheme, PHONE_ROW_HEIGHT_PX, ROW_HEIGHT_PX } from './grid-theme';
import { safeCell } from './safe-cell';

// Only what is used: the whole community bundle would double the weight of a page with a grid.
ModuleRegistry.registerModules([
  ClientSideRowModelModule,
  InfiniteRowModelModule,
  TextFilterModule,
  NumberFilterModule,
  DateFilterModule,
  QuickFilterModule,
  RowSelectionModule,
  RowStyleModule,
  CellStyleModule,
  ColumnApiModule,
  ColumnAutoSizeModule,
  RowAutoHeightModule,
  RenderApiModule,
  CsvExportModule,
]);
if (process.env.NODE_ENV !== 'production') enableDevValidations();

export interface GridHandle {
  /** Writes the rows at hand to a file, cells made safe against being run as formulas. Server rows: export on the server. */
  readonly exportCsv: (fileName: string) => void;
  /** Fetches server rows again, keeping the place. */
  readonly refresh: () => void;
  readonly clearSelection: () => void;
}

interface GridCommon<Row> {
  /** What the rows are; the grid's accessible name. */
  readonly label: string;
  readonly columns: readonly ColDef<Row>[];
  readonly rowId: (row: Row) => string;
  /** `auto` grows with its rows (up to some 200), `fill` takes what the window leaves, a number is in pixels. */
  readonly height?: 'auto' | 'fill' | number;
  readonly select?: 'none' | 'one' | 'many';
  readonly onSelect?: (rows: readonly Row[]) => void;
  /** Enter or a double click on a row. */
  readonly onOpen?: (row: Row) => void;
  /** Shown in the grid's place when there is nothing at all: an `EmptyState` that says what to do next. */
  readonly empty: ReactNode;
  /** Text that any column must contain; rows at hand only. */
  readonly quickFilter?: string;
  readonly rowClass?: (row: Row) => string | undefined;
  /** Rows as tall as their text (a few hundred at most). */
  readonly wrap?: boolean;
  readonly dense?: boolean;
  /** Column ids left out below 640 px. */
  readonly hideOnPhone?: readonly string[];
  readonly ref?: Ref<GridHandle>;
}

export type GridProps<Row> = GridCommon<Row> &
  (
    | { readonly rows: readonly Row[]; readonly source?: undefined }
    | { readonly source: GridSource<Row>; readonly rows?: undefined }
  );

const BLOCK_ROWS = 100;

export function Grid<Row extends object>(props: GridProps<Row>) {
  const {
    label,
    columns,
    rowId,
    select = 'none',
    onSelect,
    onOpen,
    empty,
    quickFilter,
    rowClass,
    wrap = false,
    dense = false,
    hideOnPhone = [],
    ref,
  } = props;
  const { rows, source } = props;
  const height = props.height ?? (source === undefined && (rows?.length ?? 0) <= 60 ? 'auto' : 'fill');
  const phone = usePhone();
  const rowHeight = phone ? PHONE_ROW_HEIGHT_PX : dense ? DENSE_ROW_HEIGHT_PX : ROW_HEIGHT_PX;
  const [api, setApi] = useState<GridApi<Row> | null>(null);
  const [failed, setFailed] = useState(false);
  // The source that was found to have nothing at all; another source is asked anew.
  const [emptySource, setEmptySource] = useState<GridSource<Row> | null>(null);

  useEffect(() => {
    api?.setGridAriaProperty('label', label);
  }, [api, label]);

  const hidden = hideOnPhone.join(' ');
  useEffect(() => {
    if (hidden !== '') api?.setColumnsVisible(hidden.split(' '), !phone);
  }, [api, phone, hidden]);

  useImperativeHandle(
    ref,
    () => ({
      exportCsv: (fileName) => api?.exportDataAsCsv({ fileName, processCellCallback: ({ value }) => safeCell(value) }),
      refresh: () => api?.refreshInfiniteCache(),
      clearSelection: () => api?.deselectAll(),
    }),
    [api],
  );

  const datasource = useMemo<IDatasource | undefined>(() => {
    if (source === undefined) return undefined;
    const controllers = new Set<AbortController>();
    return {
      getRows(params) {
        const stop = new AbortController();
        controllers.add(stop);
        const request = gridRequest(params);
        source(request, stop.signal)
          .then(
            (page) => {
              if (stop.signal.aborted) return;
              const short = page.rows.length < request.end - request.start;
              const last = page.total ?? (short ? request.start + page.rows.length : undefined);
              params.successCallback([...page.rows], last);
              setFailed(false);
              if (request.start > 0) return;
              const none = page.rows.length === 0;
              if (none && request.filters.length === 0) setEmptySource(() => source);
              if (none) params.api.showNoRowsOverlay();
              else params.api.hideOverlay();
            },
            () => {
              if (stop.signal.aborted) return;
              params.failCallback();
              setFailed(true);
            },
          )
          .finally(() => controllers.delete(stop));
      },
      destroy() {
        for (const controller of controllers) controller.abort();
      },
    };
  }, [source]);

  const definitions = useMemo(() => [...columns], [columns]);
  const data = useMemo(() => (rows === undefined ? undefined : [...rows]), [rows]);
  const defaults = useMemo<ColDef<Row>>(
    () => ({
      sortable: true,
      resizable: true,
      suppressMovable: true,
      wrapText: wrap,
      autoHeight: wrap,
      suppressHeaderMenuButton: true,
      suppressHeaderFilterButton: phone,
      filterParams: { maxNumConditions: 1 },
    }),
    [wrap, phone],
  );
  // A style element that the grid adds must bear the page's nonce where a Content-Security-Policy asks for one.
  const [nonce] = useState(() =>
    typeof document === 'undefined' ? '' : (document.querySelector<HTMLElement>('script[nonce]')?.nonce ?? ''),
  );

  if ((source !== undefined && emptySource === source) || (source === undefined && (rows?.length ?? 0) === 0))
    return <>{empty}</>;

  // Keeps the page from jumping when the grid arrives after the words round it.
  const waiting = { minHeight: 36 + (rows?.length ?? 0) * rowHeight };
  const frame =
    height === 'auto'
      ? api === null
        ? waiting
        : undefined
      : { height: height === 'fill' ? 'max(20rem, calc(100dvh - 15rem))' : height };
  return (
    <div className="grid gap-3">
      {failed ? (
        <Notice
          tone="stop"
          announce
          title="Some rows could not be fetched"
          actions={<Button onClick={() => api?.purgeInfiniteCache()}>Fetch them again</Button>}
        >
          What you see is what arrived before.
        </Notice>
      ) : null}
      <div className={`grid-frame grid-rows-of-${rowHeight} min-w-0`} style={frame}>
        <AgGridReact<Row>
          theme={gridTheme}
          {...(nonce === '' ? {} : { styleNonce: nonce })}
          columnDefs={definitions}
          defaultColDef={defaults}
          {...(datasource === undefined
            ? { rowModelType: 'clientSide' as const, rowData: data ?? [] }
            : {
                rowModelType: 'infinite' as const,
                datasource,
                cacheBlockSize: BLOCK_ROWS,
                maxBlocksInCache: 20,
                infiniteInitialRowCount: 1,
              })}
          getRowId={({ data: row }) => rowId(row)}
          domLayout={height === 'auto' ? 'autoHeight' : 'normal'}
          rowHeight={rowHeight}
          // Reading order must be the order on the screen, for screen readers and for copying text.
          ensureDomOrder
          enableCellTextSelection
          suppressCellFocus={false}
          suppressDragLeaveHidesColumns
          {...(select === 'none'
            ? {}
            : {
                selectionColumnDef: { headerComponent: source === undefined ? undefined : ChosenHead },
                rowSelection:
                  select === 'one'
                    ? { mode: 'singleRow' as const, checkboxes: false, enableClickSelection: true }
                    : {
                        mode: 'multiRow' as const,
                        checkboxes: true,
                        headerCheckbox: source === undefined,
                        enableClickSelection: false,
                      },
              })}
          {...(rowClass === undefined
            ? {}
            : { getRowClass: ({ data: row }) => (row === undefined ? undefined : rowClass(row)) })}
          {...(quickFilter === undefined || source !== undefined ? {} : { quickFilterText: quickFilter })}
          overlayComponentParams={{
            noRows: { overlayText: 'No row matches. Clear a filter to see more.' },
            noMatchingRows: { overlayText: 'No row matches. Clear a filter to see more.' },
            loading: { overlayText: 'Fetching rows' },
          }}
          onGridReady={(event) => setApi(event.api)}
          onSelectionChanged={(event) => onSelect?.(event.api.getSelectedRows())}
          onRowDoubleClicked={(event) => {
            if (event.data !== undefined) onOpen?.(event.data);
          }}
          onCellKeyDown={(event) => {
            if (!(event.event instanceof KeyboardEvent) || event.event.key !== 'Enter' || event.data === undefined)
              return;
            // A link or button inside the cell keeps its own Enter.
            if (event.event.target instanceof HTMLElement && event.event.target.closest('a, button, input')) return;
            onOpen?.(event.data);
          }}
        />
      </div>
    </div>
  );
}

/** Names the column of tick boxes where its head has no box of its own. */
function ChosenHead() {
  return <span className="sr-only">Chosen</span>;
}

const PHONE = '(max-width: 639px)';

function usePhone(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia(PHONE);
      query.addEventListener('change', changed);
      return () => query.removeEventListener('change', changed);
    },
    () => window.matchMedia(PHONE).matches,
    () => false,
  );
}
