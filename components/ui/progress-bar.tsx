/** How far a piece of work is, in numbers and as a bar; `total` null while it is not known yet. */

export function ProgressBar({
  label,
  done,
  total,
  unit,
  note,
}: {
  readonly label: string;
  readonly done: number;
  readonly total: number | null;
  /** What is counted, in the plural: "lines", "bins". */
  readonly unit: string;
  readonly note?: string;
}) {
  const known = total !== null && total > 0;
  const share = known ? Math.min(1, Math.max(0, done / total)) : 0;
  const text = known ? `${format(done)} of ${format(total)} ${unit}` : `${format(done)} ${unit} so far`;
  return (
    <div>
      <div className="mb-1 flex flex-wrap justify-between gap-x-4 text-small">
        <span className="font-semibold">{label}</span>
        <span className="font-mono text-soft">{text}</span>
      </div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={known ? total : undefined}
        aria-valuenow={known ? Math.min(done, total) : undefined}
        aria-valuetext={text}
        className={`h-2 border border-edge ${known ? 'bg-sheet' : 'waiting'}`}
      >
        <div className="h-full bg-copper" style={{ width: `${share * 100}%` }} />
      </div>
      {note !== undefined ? <p className="mt-1 text-fine text-soft">{note}</p> : null}
    </div>
  );
}

function format(count: number): string {
  return count.toLocaleString('en-GB');
}
