/**
 * An effect on its tolerance band: the band a figure may lie in, where the part asked for puts it, and where the part
 * offered would. Everything is in percent of the figure asked for, so that any figure is drawn the same way.
 */

export interface RangePoint {
  /** Percent from the figure asked for; 0 is that figure itself. */
  readonly percent: number;
  /** Spread from tolerances, in the same percent; left out where it was not computed. */
  readonly lowPercent?: number;
  readonly highPercent?: number;
  /** The figure in words: "4.21 Hz". */
  readonly text: string;
}

const WIDTH = 380;
const MARGIN = 12;

export function BandedRange({
  label,
  bandPercent,
  asked,
  offered,
}: {
  /** What the figure is: "Clock rate". */
  readonly label: string;
  /** ± percent that the line can bear. */
  readonly bandPercent: number;
  readonly asked: RangePoint;
  /** Null where the part offered gives no figure at all (it would not oscillate). */
  readonly offered: RangePoint | null;
}) {
  const x = scale(bandPercent, asked, offered);
  const left = x(-bandPercent);
  const right = x(bandPercent);
  const inside = offered !== null && Math.abs(offered.percent) <= bandPercent;
  const offeredInk = inside ? 'amber' : 'oxide';
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${offered === null ? 76 : 96}`}
      className="block w-full max-w-[30rem]"
      role="img"
      aria-label={rangeName({ label, bandPercent, asked, offered })}
    >
      <rect x={left} y="10" width={right - left} height="26" className="fill-mask-wash" />
      <path d={`M${MARGIN - 8} 36H${WIDTH - MARGIN + 8}`} className="stroke-rule" strokeWidth="1" />
      <Whisker point={asked} x={x} y={20} stroke="stroke-ink" fill="fill-ink" />
      <path d={`M${x(0)} 5v32`} className="stroke-mask" strokeWidth="1.6" />
      <circle cx={x(asked.percent)} cy="20" r="3.6" className="fill-ink" />
      <Label x={left} y={50}>{`−${plain(bandPercent)} %`}</Label>
      <Label x={right} y={50}>{`+${plain(bandPercent)} %`}</Label>
      <Label x={x(asked.percent)} y={50} strong>
        {asked.text}
      </Label>
      {offered === null ? (
        <g>
          <path d={`M${WIDTH - 54} 64h42`} className="stroke-oxide" strokeWidth="1.6" strokeDasharray="3 2.5" />
          <text x={WIDTH - 60} y="68" fontSize="11.5" textAnchor="end" className="fill-oxide">
            offered: no figure
          </text>
        </g>
      ) : (
        <g>
          <Whisker
            point={offered}
            x={x}
            y={68}
            stroke={offeredInk === 'amber' ? 'stroke-amber' : 'stroke-oxide'}
            fill={offeredInk === 'amber' ? 'fill-amber' : 'fill-oxide'}
          />
          {/* A square for the offered, a disc for the asked: told apart without colour. */}
          <rect
            x={x(offered.percent) - 3.5}
            y="64.5"
            width="7"
            height="7"
            className={offeredInk === 'amber' ? 'fill-amber' : 'fill-oxide'}
          />
          <path d={`M${left} 36v40M${right} 36v40`} className="stroke-rule" strokeWidth="1" strokeDasharray="2 3" />
          <Label x={x(offered.percent)} y={88} strong>
            {offered.text}
          </Label>
        </g>
      )}
    </svg>
  );
}

function Whisker({
  point,
  x,
  y,
  stroke,
  fill,
}: {
  readonly point: RangePoint;
  readonly x: (percent: number) => number;
  readonly y: number;
  readonly stroke: string;
  readonly fill: string;
}) {
  if (point.lowPercent === undefined || point.highPercent === undefined) return null;
  const low = x(point.lowPercent);
  const high = x(point.highPercent);
  return (
    <path
      d={`M${low} ${y - 4}v8M${high} ${y - 4}v8M${low} ${y}H${high}`}
      className={`${stroke} ${fill}`}
      strokeWidth="1.6"
    />
  );
}

function Label({
  x,
  y,
  strong = false,
  children,
}: {
  readonly x: number;
  readonly y: number;
  readonly strong?: boolean;
  readonly children: string;
}) {
  const half = children.length * 3.6;
  const kept = Math.min(WIDTH - half, Math.max(half, x));
  return (
    <text
      x={kept}
      y={y}
      fontSize="11.5"
      textAnchor="middle"
      className={`font-mono ${strong ? 'fill-ink font-semibold' : 'fill-soft'}`}
    >
      {children}
    </text>
  );
}

/** Percent to drawing units, wide enough for the band with room beside it and for both spreads. */
function scale(bandPercent: number, asked: RangePoint, offered: RangePoint | null): (percent: number) => number {
  const reaches = [
    bandPercent * 1.9,
    asked.percent,
    asked.lowPercent,
    asked.highPercent,
    offered?.percent,
    offered?.lowPercent,
    offered?.highPercent,
  ];
  const reach = Math.max(...reaches.map((value) => Math.abs(value ?? 0)), 0.001) * 1.04;
  return (percent) => WIDTH / 2 + (percent / reach) * (WIDTH / 2 - MARGIN);
}

function plain(percent: number): string {
  return String(Number(percent.toPrecision(3)));
}

function signed(percent: number): string {
  return `${percent < 0 ? '−' : '+'}${plain(Math.abs(percent))} %`;
}

/** What a screen reader says of the drawing. */
export function rangeName({
  label,
  bandPercent,
  asked,
  offered,
}: {
  readonly label: string;
  readonly bandPercent: number;
  readonly asked: RangePoint;
  readonly offered: RangePoint | null;
}): string {
  const spread = (point: RangePoint) =>
    point.lowPercent === undefined || point.highPercent === undefined
      ? ''
      : `, spread ${signed(point.lowPercent)} to ${signed(point.highPercent)}`;
  const first = `${label}: ${asked.text} as asked for${spread(asked)}, band ±${plain(bandPercent)} %.`;
  if (offered === null) return `${first} The part offered gives no figure.`;
  const where = Math.abs(offered.percent) <= bandPercent ? 'inside the band' : 'outside the band';
  return `${first} Offered: ${offered.text}, ${signed(offered.percent)}, ${where}${spread(offered)}.`;
}
