/** A TO-92 with its flat face to the reader and its legs down: the letters say which lead is which, left to right. */
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

/** `leads` from left to right, such as `EBC` or `CBE`; null where it is not known, which is drawn as question marks. */
export function To92Drawing({
  leads,
  mark,
  name,
  scale,
}: DrawingSize & { readonly leads: string | null; readonly mark: string }) {
  const letters = (leads ?? '???').slice(0, 3).split('');
  const width = 46 + mark.length * 6.4;
  return (
    <DrawingFrame width={width} height={36} name={name} {...(scale === undefined ? {} : { scale })}>
      {letters.map((letter, index) => (
        <g key={index}>
          <path d={`M${9 + index * 11} 17v8`} className="stroke-part-lead" strokeWidth="2" />
          <Print x={9 + index * 11} y={30.5} size={10} fill="fill-ink">
            {letter}
          </Print>
        </g>
      ))}
      <path
        d="M6 1.5h28q2 0 2 2v14.5h-32v-14.5q0 -2 2 -2z"
        className="fill-part-epoxy stroke-part-outline"
        strokeWidth="1"
      />
      <path d="M8 5h24" className="stroke-part-print/30" strokeWidth="1" />
      <Print x={42} y={11} size={10} fill="fill-ink" anchor="start" weight={400}>
        {mark}
      </Print>
    </DrawingFrame>
  );
}
