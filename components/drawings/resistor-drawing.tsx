/** A leaded resistor: dumb-bell body, bands from the left, the tolerance band set apart at the right. */
import { BAND_FILL, type BandColour } from './bands';
import { DrawingFrame, type DrawingSize } from './drawing-frame';

const WIDTH = 96;
const HEIGHT = 22;
const BODY_LEFT = 17;
const BODY_RIGHT = 79;
const BAND_WIDTH = 4.6;

/**
 * `bands` in reading order, 3 to 6 of them. The body is blue for the close tolerances (metal film) and tan for 5 % and
 * wider (carbon film): common practice among makers, no standard.
 */
export function ResistorDrawing({
  bands,
  body,
  name,
  scale,
}: DrawingSize & { readonly bands: readonly BandColour[]; readonly body: 'blue' | 'tan' }) {
  const fill = body === 'blue' ? 'fill-part-blue' : 'fill-part-tan';
  return (
    <DrawingFrame width={WIDTH} height={HEIGHT} name={name} {...(scale === undefined ? {} : { scale })}>
      <path d={`M0 11H${WIDTH}`} className="stroke-part-lead" strokeWidth="1.6" fill="none" />
      <path
        d={`M${BODY_LEFT + 2} 2.5h8q2 0 3 1.5h36q1 -1.5 3 -1.5h8q2 0 2 2v13q0 2 -2 2h-8q-2 0 -3 -1.5h-36q-1 1.5 -3 1.5h-8q-2 0 -2 -2v-13q0 -2 2 -2z`}
        className={`stroke-part-outline ${fill}`}
        strokeWidth="1"
      />
      {bandPositions(bands.length).map((x, index) => {
        const colour = bands[index];
        if (colour === undefined) return null;
        const onCap = x < BODY_LEFT + 11 || x > BODY_RIGHT - 13;
        return (
          <rect
            key={index}
            data-band={colour}
            x={x}
            y={onCap ? 3 : 4.5}
            width={BAND_WIDTH}
            height={onCap ? 16 : 13}
            className={`stroke-part-dark/35 ${BAND_FILL[colour]}`}
            strokeWidth="0.5"
          />
        );
      })}
    </DrawingFrame>
  );
}

/** Left edges of the bands: value and multiplier evenly spaced, tolerance apart, temperature coefficient at the very end. */
export function bandPositions(count: number): readonly number[] {
  const first = BODY_LEFT + 4;
  const tolerance = BODY_RIGHT - 9.5;
  if (count <= 3) return Array.from({ length: count }, (_, index) => first + index * 9.5);
  if (count === 4) return [first, first + 11, first + 22, tolerance];
  if (count === 5) return [first, first + 9.5, first + 19, first + 28.5, tolerance];
  return [first, first + 8, first + 16, first + 24, first + 34, tolerance + 1];
}
