/** What a change of parts does to a figure: in percent and, for frequencies, in cents. */
import { type Figure, FigureError } from './compute-figure';

export interface Effect {
  readonly before: number;
  readonly after: number;
  readonly percent: number;
  /** 1200·log2(after/before); null for figures that are no frequency. */
  readonly cents: number | null;
}

/**
 * @throws FigureError (`contradiction`) where the two are not the same figure, so that hertz is never set against volts
 */
export function effectOf(before: Figure, after: Figure): Effect {
  if (before.kind !== after.kind || before.unit !== after.unit) {
    throw new FigureError('contradiction', null, `A ${before.kind} cannot be compared with a ${after.kind}.`);
  }
  const ratio = after.value / before.value;
  return {
    before: before.value,
    after: after.value,
    percent: (ratio - 1) * 100,
    cents: before.kind === 'frequency' ? 1200 * Math.log2(ratio) : null,
  };
}
