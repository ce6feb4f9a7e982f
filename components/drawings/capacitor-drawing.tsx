/** Leaded capacitors as they lie in the drawer: disc, film box, can and tantalum drop, each with the text that it bears. */
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

export type CapacitorShape = 'disc' | 'box' | 'can' | 'can-bipolar' | 'drop';

/** `mark` is what stands on the body ("104", "2n2"); `second` a further line (the voltage on a can). */
export function CapacitorDrawing({
  shape,
  mark,
  second,
  name,
  scale,
}: DrawingSize & { readonly shape: CapacitorShape; readonly mark: string; readonly second?: string }) {
  const size = { name, ...(scale === undefined ? {} : { scale }) };
  if (shape === 'disc') {
    return (
      <DrawingFrame width={48} height={34} {...size}>
        <path d="M17 22v11M31 22v11" className="stroke-part-lead" strokeWidth="1.6" />
        <ellipse cx="24" cy="13.5" rx="21" ry="12" className="fill-part-ceramic stroke-part-outline" strokeWidth="1" />
        <Print x={24} y={13.8} size={12} fill="fill-part-dark" fit={34}>
          {mark}
        </Print>
      </DrawingFrame>
    );
  }
  if (shape === 'box') {
    return (
      <DrawingFrame width={58} height={34} {...size}>
        <path d="M14 23v10M44 23v10" className="stroke-part-lead" strokeWidth="1.6" />
        <rect x="3.5" y="2.5" width="51" height="22" className="fill-part-film stroke-part-outline" strokeWidth="1" />
        <Print x={29} y={second === undefined ? 13.8 : 9.6} size={second === undefined ? 12 : 10} fit={46}>
          {mark}
        </Print>
        {second === undefined ? null : (
          <Print x={29} y={19} size={8} fit={46}>
            {second}
          </Print>
        )}
      </DrawingFrame>
    );
  }
  if (shape === 'drop') {
    return (
      <DrawingFrame width={40} height={36} {...size}>
        <path d="M14 24v11M26 24v11" className="stroke-part-lead" strokeWidth="1.6" />
        <path
          d="M20 1.5C31 1.5 36 8 35 15c-.8 6-5 10.5-9 11.5H14C10 25.5 5.8 21 5 15 4 8 9 1.5 20 1.5z"
          className="fill-part-tantalum stroke-part-outline"
          strokeWidth="1"
        />
        <Print x={20} y={10} size={9.5} fill="fill-part-dark" fit={26}>
          {mark}
        </Print>
        {/* The plus marks the positive lead of a tantalum; a can's stripe marks the negative one. */}
        <Print x={13} y={20.5} size={10} fill="fill-part-dark">
          +
        </Print>
      </DrawingFrame>
    );
  }
  return (
    <DrawingFrame width={64} height={30} {...size}>
      {/* Lying on its side, leads to the right, as it comes out of a bag; the stripe runs along the negative lead. */}
      <path d="M52 9h12" className="stroke-part-lead" strokeWidth="1.6" />
      <path d={shape === 'can' ? 'M52 21h8' : 'M52 21h12'} className="stroke-part-lead" strokeWidth="1.6" />
      <path
        d="M3 2.5h47.5q2.5 0 2.5 2.5v20q0 2.5-2.5 2.5H3q-2 0-2-2V4.5q0-2 2-2z"
        className="fill-part-can stroke-part-outline"
        strokeWidth="1"
      />
      {shape === 'can' ? (
        <g>
          <rect x="1.5" y="19" width="51" height="7" className="fill-part-stripe" />
          <path d="M8 22.5h6M24 22.5h6M40 22.5h6" className="stroke-part-dark" strokeWidth="1.8" />
        </g>
      ) : (
        <Print x={27} y={22} size={8}>
          BP
        </Print>
      )}
      <Print x={26} y={10.8} size={10.5} fit={47}>
        {second === undefined ? mark : `${mark} ${second}`}
      </Print>
    </DrawingFrame>
  );
}
