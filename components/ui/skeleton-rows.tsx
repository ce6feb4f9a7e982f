/** Rows that are on their way: same height as real ones, so that nothing jumps when they arrive. */

export function SkeletonRows({
  rows = 6,
  columns = 4,
  what = 'rows',
}: {
  readonly rows?: number;
  readonly columns?: number;
  readonly what?: string;
}) {
  return (
    <div role="status" className="border border-rule bg-sheet">
      <span className="sr-only">Fetching {what}</span>
      {Array.from({ length: rows }, (_, row) => (
        <div
          key={row}
          aria-hidden
          className="flex h-[38px] items-center gap-6 border-b border-hair px-2.5 last:border-0 max-sm:h-12"
        >
          {Array.from({ length: columns }, (_, column) => (
            <span key={column} className={`waiting h-3 ${column === 1 ? 'flex-[2]' : 'flex-1'}`} />
          ))}
        </div>
      ))}
    </div>
  );
}
