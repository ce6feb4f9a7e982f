/**
 * A hairline table for lists of a page's length; longer ones go in the grid. With `stacked`, each row becomes a block of
 * "name value" lines on a phone: give every `Cell` its `label`. Roles are spelled out because browsers drop a table's
 * meaning when its display changes.
 */
import type { ReactNode } from 'react';

const BLOCKS =
  'max-sm:[&_tbody]:block max-sm:[&_tr]:block max-sm:[&_td]:block max-sm:[&_th[scope=row]]:block max-sm:[&_thead]:sr-only ' +
  'max-sm:[&_tbody_tr]:py-2 max-sm:[&_tbody_td]:!py-0.5 max-sm:[&_tbody_th]:!py-0.5 max-sm:[&_td]:!text-left max-sm:[&_td]:!h-auto max-sm:[&_th]:!h-auto max-sm:[&_tbody_td]:!border-0 max-sm:[&_tbody_th]:!border-0 ' +
  'max-sm:[&_tbody_tr]:border-b max-sm:[&_tbody_tr]:border-hair ' +
  'max-sm:[&_td[data-label]]:grid max-sm:[&_td[data-label]]:grid-cols-[7rem_minmax(0,1fr)] max-sm:[&_td[data-label]]:gap-x-3 ' +
  'max-sm:[&_td[data-label]]:before:content-[attr(data-label)] max-sm:[&_td[data-label]]:before:font-sans max-sm:[&_td[data-label]]:before:text-small max-sm:[&_td[data-label]]:before:text-soft';

export function Table({
  label,
  stacked = false,
  stickyHead = false,
  dense = false,
  children,
}: {
  /** What the table lists; its accessible name. */
  readonly label: string;
  readonly stacked?: boolean;
  /** Keeps the head in sight while the page scrolls; the table must then be no wider than the page. */
  readonly stickyHead?: boolean;
  readonly dense?: boolean;
  readonly children: ReactNode;
}) {
  const table = (
    <table
      role="table"
      aria-label={label}
      className={`w-full border border-rule bg-sheet ${stickyHead ? 'border-separate border-spacing-0 [&_thead_th]:sticky [&_thead_th]:top-0 [&_thead_th]:z-10 [&_thead_th]:bg-sheet' : 'border-collapse'} ${dense ? '[&_tbody_td]:h-8 [&_tbody_th]:h-8' : '[&_tbody_td]:h-[38px] [&_tbody_th]:h-[38px]'} ${stacked ? BLOCKS : ''}`}
    >
      {children}
    </table>
  );
  if (stacked || stickyHead) return table;
  // A wide table scrolls in its own frame and not the page; the frame takes the focus so that a keyboard can scroll it.
  return (
    <div role="region" aria-label={`${label}, scrollable`} tabIndex={0} className="relative max-w-full overflow-x-auto">
      {table}
    </div>
  );
}

export function TableHead({ children }: { readonly children: ReactNode }) {
  return (
    <thead role="rowgroup">
      <tr role="row">{children}</tr>
    </thead>
  );
}

export function TableBody({ children }: { readonly children: ReactNode }) {
  return <tbody role="rowgroup">{children}</tbody>;
}

export function HeadCell({
  children,
  number = false,
  width,
  sorted,
  hideLabel = false,
}: {
  readonly children: ReactNode;
  /** A column whose cells say enough to the eye still needs a name for the ear. */
  readonly hideLabel?: boolean;
  readonly number?: boolean;
  readonly width?: string;
  readonly sorted?: 'ascending' | 'descending';
}) {
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={sorted}
      style={width === undefined ? undefined : { width }}
      className={`border-b border-ink px-2.5 py-2 text-small font-semibold whitespace-nowrap text-soft ${number ? 'text-right' : 'text-left'}`}
    >
      {hideLabel ? <span className="sr-only">{children}</span> : children}
    </th>
  );
}

export function TableRow({
  children,
  tone,
  selected = false,
}: {
  readonly children: ReactNode;
  /** `hatched` for a row that is no part, `total` for a closing line. */
  readonly tone?: 'hatched' | 'total' | undefined;
  readonly selected?: boolean;
}) {
  const look = selected
    ? 'bg-copper-wash'
    : tone === 'hatched'
      ? 'hatched text-soft'
      : tone === 'total'
        ? 'font-semibold'
        : '';
  return (
    <tr role="row" aria-selected={selected || undefined} className={look}>
      {children}
    </tr>
  );
}

export function Cell({
  children,
  number = false,
  mono = false,
  soft = false,
  head = false,
  label,
  span,
}: {
  readonly children?: ReactNode;
  /** Right-aligned, in the values' type. */
  readonly number?: boolean;
  readonly mono?: boolean;
  readonly soft?: boolean;
  /** The cell that names its row. */
  readonly head?: boolean;
  /** The column's name, shown before the value where rows are stacked. */
  readonly label?: string;
  readonly span?: number;
}) {
  const className = `border-b border-hair px-2.5 py-1.5 align-middle font-normal ${number ? 'text-right font-mono whitespace-nowrap' : 'text-left'} ${mono ? 'font-mono' : ''} ${soft ? 'text-soft' : ''}`;
  if (head) {
    return (
      <th role="rowheader" scope="row" colSpan={span} className={className}>
        {children}
      </th>
    );
  }
  return (
    <td role="cell" colSpan={span} data-label={label} className={className}>
      {label === undefined ? children : <div className="min-w-0">{children}</div>}
    </td>
  );
}
