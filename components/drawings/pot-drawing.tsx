/** A potentiometer from the shaft side with its mark ("B50k"), or a trimmer from above with its code and slot. */
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

export function PotDrawing({
  form,
  mark,
  name,
  scale,
}: DrawingSize & { readonly form: 'potentiometer' | 'trimmer'; readonly mark: string }) {
  const size = { name, ...(scale === undefined ? {} : { scale }) };
  if (form === 'trimmer') {
    return (
      <DrawingFrame width={34 + 6 + mark.length * 6.4} height={36} {...size}>
        <path d="M9 28v7M17 28v7M25 28v7" className="stroke-part-lead" strokeWidth="1.8" />
        <rect x="3" y="2" width="28" height="27" className="fill-band-blue stroke-part-outline" strokeWidth="1" />
        <circle cx="17" cy="15.5" r="8" className="fill-part-print stroke-part-outline" strokeWidth="1" />
        <path d="M11.5 21l11-11" className="stroke-part-dark" strokeWidth="2" />
        <Print x={38} y={15} size={10} fill="fill-ink" anchor="start" weight={400}>
          {mark}
        </Print>
      </DrawingFrame>
    );
  }
  return (
    <DrawingFrame width={36 + 6 + mark.length * 6.4} height={36} {...size}>
      <path d="M10 26v9M18 26v9M26 26v9" className="stroke-part-lead" strokeWidth="1.8" />
      <rect x="3" y="2" width="30" height="25" rx="2" className="fill-part-metal stroke-part-outline" strokeWidth="1" />
      <circle cx="18" cy="14" r="9" className="fill-part-stripe stroke-part-outline" strokeWidth="1" />
      <circle cx="18" cy="14" r="5" className="fill-part-metal stroke-part-outline" strokeWidth="1" />
      <path d="M18 14v-5" className="stroke-part-dark" strokeWidth="1.6" />
      <Print x={40} y={14} size={10} fill="fill-ink" anchor="start" weight={400}>
        {mark}
      </Print>
    </DrawingFrame>
  );
}
