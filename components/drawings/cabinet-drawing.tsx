/**
 * A cabinet as it looks: one cell a drawer, in its own place, filled as the ledger says, lit and numbered where the
 * current pick stops, flagged where a count is due. Every drawer is a link. On a narrow screen the cabinet scrolls in
 * its own frame rather than losing its shape: the place of a drawer is what a storekeeper remembers.
 */
import Link from 'next/link';

export interface DrawnBin {
  readonly code: string;
  /** What lies in it, as short as on the drawer's front ("4k7", "BAT42"); null for an empty or unassigned drawer. */
  readonly content: string | null;
  /** Said in place of `content` where that is too short to be understood when heard. */
  readonly contentName?: string;
  /** 0 to 1 of what the drawer holds when full; null where that is not known. */
  readonly fill: number | null;
  readonly href: string;
  /** Number of the stop in the current pick, from 1. */
  readonly stop?: number | null;
  /** The stop has been taken already. */
  readonly stopDone?: boolean;
  readonly countDue?: boolean;
  readonly selected?: boolean;
  /** Counted from 1, from the upper left. */
  readonly column: number;
  readonly row: number;
  /** Drawers wider than one place. */
  readonly span?: number;
}

export function CabinetDrawing({
  label,
  columns,
  bins,
}: {
  readonly label: string;
  readonly columns: number;
  readonly bins: readonly DrawnBin[];
}) {
  const inOrder = [...bins].sort((a, b) => a.row - b.row || a.column - b.column);
  return (
    <div role="region" aria-label={label} tabIndex={0} className="relative max-w-full overflow-x-auto p-1">
      <ul className="grid gap-[3px]" style={{ gridTemplateColumns: `repeat(${columns}, minmax(74px, 84px))` }}>
        {inOrder.map((bin) => (
          <li key={bin.code} style={{ gridColumn: `${bin.column} / span ${bin.span ?? 1}`, gridRow: bin.row }}>
            <Drawer bin={bin} />
          </li>
        ))}
      </ul>
    </div>
  );
}

function Drawer({ bin }: { readonly bin: DrawnBin }) {
  const lit = bin.stop !== undefined && bin.stop !== null;
  const share = bin.fill === null ? 0 : Math.min(1, Math.max(0, bin.fill));
  const edge = bin.selected
    ? 'border-2 border-ink'
    : lit
      ? 'border-2 border-copper'
      : 'border border-rule hover:border-copper';
  return (
    <Link
      href={bin.href}
      aria-label={binName(bin)}
      title={bin.contentName ?? bin.content ?? bin.code}
      className={`relative block h-[76px] overflow-hidden ${edge} ${lit ? 'bg-copper-wash' : 'bg-sheet'}`}
    >
      {/* The level stands in the lower part only, under the words, so that its edge never strikes through them. */}
      <span aria-hidden className="absolute inset-x-0 bottom-0 flex h-10 items-end">
        <span className={`w-full ${lit ? 'bg-copper/30' : 'bg-soft/20'}`} style={{ height: `${share * 100}%` }} />
      </span>
      <span aria-hidden className="absolute inset-x-0 bottom-3.5 flex justify-center">
        <span className="h-1 w-6 bg-soft" />
      </span>
      <span aria-hidden className="relative block px-1.5 pt-1 leading-tight">
        <span
          className={`block truncate font-mono text-small font-semibold ${bin.content === null ? 'text-soft' : ''} ${bin.countDue ? 'pr-3' : ''}`}
        >
          {bin.content ?? '–'}
        </span>
        <span className="block truncate font-mono text-[0.6875rem] text-soft">{bin.code}</span>
      </span>
      {bin.countDue ? (
        <svg aria-hidden viewBox="0 0 14 14" className="absolute top-0 right-0 size-3.5 fill-amber">
          <path d="M0 0h14v14z" />
        </svg>
      ) : null}
      {lit ? (
        <span
          aria-hidden
          className={`absolute right-1 bottom-1 flex h-[19px] min-w-[19px] items-center justify-center rounded-full px-1 text-[0.6875rem] font-bold ${bin.stopDone ? 'border border-copper bg-sheet text-copper' : 'bg-copper text-sheet'}`}
        >
          {bin.stopDone ? '✓' : bin.stop}
        </span>
      ) : null}
    </Link>
  );
}

/** What a screen reader says of a drawer. */
export function binName(bin: DrawnBin): string {
  const parts = [`Bin ${bin.code}`, bin.contentName ?? bin.content ?? 'nothing assigned'];
  if (bin.fill !== null)
    parts.push(bin.fill <= 0 ? 'empty' : `about ${Math.max(1, Math.round(Math.min(1, bin.fill) * 100))} % full`);
  if (bin.stop !== undefined && bin.stop !== null)
    parts.push(bin.stopDone ? `stop ${bin.stop} of the pick, taken` : `stop ${bin.stop} of the pick`);
  if (bin.countDue) parts.push('due for a count');
  return parts.join(', ');
}
