/** What was on hand at the end of each day, as a step line with its highest, lowest and last figure in words. */

interface DayBalance {
  readonly day: string;
  readonly balance: number;
}

const WIDTH = 640;
const HEIGHT = 110;
const EDGE = 6;

export function StockHistory({ history }: { readonly history: readonly DayBalance[] }) {
  const [first] = history;
  const last = history.at(-1);
  if (!first || !last) return null;
  const most = Math.max(1, ...history.map((one) => one.balance));
  const from = Date.parse(first.day);
  const span = Math.max(1, Date.parse(last.day) - from);
  const x = (day: string) => EDGE + ((Date.parse(day) - from) / span) * (WIDTH - 2 * EDGE);
  const y = (balance: number) => HEIGHT - EDGE - (balance / most) * (HEIGHT - 2 * EDGE);
  const line = history
    .map((one, index) => (index === 0 ? `M${x(one.day)} ${y(one.balance)}` : `H${x(one.day)}V${y(one.balance)}`))
    .join('');
  const said = `From ${first.balance} on ${first.day} to ${last.balance} on ${last.day}; at most ${most}.`;
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="w-full max-w-[44rem] border-b border-rule"
        role="img"
        aria-label={said}
      >
        <path d={line} className="fill-none stroke-copper" strokeWidth="2" />
        <circle cx={x(last.day)} cy={y(last.balance)} r="3.5" className="fill-copper" />
      </svg>
      <figcaption className="mt-1 text-small text-soft">{said}</figcaption>
    </figure>
  );
}
