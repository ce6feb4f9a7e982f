/** A surface-mount resistor or capacitor. A chip capacitor bears no mark: its reel or bag is all that tells it. */
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

export function ChipDrawing({
  kind,
  mark,
  name,
  scale,
}: DrawingSize & { readonly kind: 'resistor' | 'capacitor'; readonly mark: string | null }) {
  return (
    <DrawingFrame width={50} height={28} name={name} {...(scale === undefined ? {} : { scale })}>
      <rect x="1.5" y="3" width="47" height="22" className="fill-part-metal stroke-part-outline" strokeWidth="1" />
      <rect
        x="9"
        y="3"
        width="32"
        height="22"
        className={`stroke-part-outline ${kind === 'resistor' ? 'fill-part-epoxy' : 'fill-part-chip'}`}
        strokeWidth="1"
      />
      {mark === null ? null : (
        <Print x={25} y={14.3} size={12} fit={29}>
          {mark}
        </Print>
      )}
    </DrawingFrame>
  );
}
