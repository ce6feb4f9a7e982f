/** A diode with its cathode band at the right, lettered K; an LED with its flat side and short lead at the cathode. */
import { BAND_FILL, type BandColour } from './bands';
import { DrawingFrame, type DrawingSize, Print } from './drawing-frame';

/** `body` glass (small-signal) or black (rectifiers, power Schottky); `band` is the cathode's colour. */
export function DiodeDrawing({
  body,
  band = body === 'glass' ? 'black' : 'silver',
  name,
  scale,
}: DrawingSize & { readonly body: 'glass' | 'black'; readonly band?: BandColour }) {
  const tall = body === 'glass' ? 11 : 15;
  const top = 11 - tall / 2;
  return (
    <DrawingFrame width={96} height={22} name={name} {...(scale === undefined ? {} : { scale })}>
      <path d="M0 11h96" className="stroke-part-lead" strokeWidth="1.6" />
      <rect
        x="28"
        y={top}
        width="40"
        height={tall}
        rx={body === 'glass' ? 4 : 1}
        className={`stroke-part-outline ${body === 'glass' ? 'fill-part-glass' : 'fill-part-epoxy'}`}
        strokeWidth="1"
      />
      <rect data-band={band} x="56" y={top + 0.5} width="6" height={tall - 1} className={BAND_FILL[band]} />
      <Print x={80} y={5} size={8} fill="fill-soft" weight={400}>
        K
      </Print>
    </DrawingFrame>
  );
}

export function LedDrawing({
  colour,
  name,
  scale,
}: DrawingSize & { readonly colour: 'red' | 'green' | 'yellow' | 'blue' | 'white' | 'orange' }) {
  return (
    <DrawingFrame width={44} height={36} name={name} {...(scale === undefined ? {} : { scale })}>
      {/* The longer lead is the anode; the flat of the rim is at the cathode. */}
      <path d="M16 22v13M26 22v8" className="stroke-part-lead" strokeWidth="1.8" />
      <path d="M11 20v-9a10 9.5 0 0 1 20 0v9z" className={`stroke-part-outline ${BAND_FILL[colour]}`} strokeWidth="1" />
      <rect x="9" y="19" width="22" height="4" className={`stroke-part-outline ${BAND_FILL[colour]}`} strokeWidth="1" />
      <Print x={36} y={28} size={8} fill="fill-soft" weight={400}>
        K
      </Print>
    </DrawingFrame>
  );
}
