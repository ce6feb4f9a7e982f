/** An integrated circuit from above: notch at the left, pin 1 dotted at the lower left, pins counted anticlockwise. */
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

/** `pins` in total, an even number from 4 up; drawn up to 40. */
export function IcDrawing({ pins, mark, name, scale }: DrawingSize & { readonly pins: number; readonly mark: string }) {
  const side = Math.max(2, Math.min(20, Math.round(pins / 2)));
  const bodyWidth = Math.max(58, side * 10 + 8, mark.length * 6 + 26);
  const width = bodyWidth + 4;
  const pitch = bodyWidth / side;
  const legs = Array.from({ length: side }, (_, index) => 2 + pitch * (index + 0.5));
  return (
    <DrawingFrame width={width} height={34} name={name} {...(scale === undefined ? {} : { scale })}>
      {legs.map((x) => (
        <g key={x} className="fill-part-lead">
          <rect data-pin x={x - 1.5} y="1" width="3" height="7" />
          <rect data-pin x={x - 1.5} y="26" width="3" height="7" />
        </g>
      ))}
      <path
        d={`M2 6h${bodyWidth}v22H2v-7.5a3.5 3.5 0 0 0 0 -7z`}
        className="fill-part-epoxy stroke-part-outline"
        strokeWidth="1"
      />
      <circle cx="8" cy="23.5" r="1.7" className="fill-part-print" />
      <Print x={2 + bodyWidth / 2 + 3} y={17.3} size={10.5} fit={bodyWidth - 22}>
        {mark}
      </Print>
    </DrawingFrame>
  );
}
