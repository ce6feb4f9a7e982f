/** Tolerance, volts, watts and amperes in a text, and the text without them. */

export interface Ratings {
  readonly tolerancePercent: number | null;
  readonly ratedVolts: number | null;
  readonly ratedWatts: number | null;
  readonly ratedAmperes: number | null;
  /** What is left for values, numbers and words. */
  readonly rest: string;
}

const N = String.raw`(\d+(?:[.,]\d+)?|[.,]\d+)`;
const TOLERANCE = new RegExp(String.raw`(?:±|\+/?-|\+-)?\s*${N}\s*%`);
const VOLTS = new RegExp(String.raw`(^|[\s/*,;@(xX-])${N}\s*(k)?\s*(?:V(?:DC|AC|R)?|volts?)(?=$|[\s,;)/*-])`, 'i');
const FRACTION_WATTS = /(^|[\s/*,;(])(\d)\s*\/\s*(\d{1,2})\s*W(?:att)?s?(?=$|[\s,;)/])/i;
const WATTS = new RegExp(String.raw`(^|[\s/*,;(])${N}\s*(m)?\s*W(?:att)?s?(?=$|[\s,;)/])`, 'i');
const AMPERES = new RegExp(String.raw`(^|[\s/*,;(])${N}\s*(m)?\s*A(?:mps?)?(?=$|[\s,;)/])`);

const toFloat = (text: string | undefined): number => Number((text ?? '').replace(',', '.'));

/** Reads and removes ratings; a number only counts as one with its unit. Percent within 0.001 … 50, volts to 10 kV. */
export function readRatings(text: string): Ratings {
  let rest = text;
  const take = (pattern: RegExp): RegExpExecArray | null => {
    const found = pattern.exec(rest);
    if (found) rest = `${rest.slice(0, found.index)} ${rest.slice(found.index + found[0].length)}`;
    return found;
  };
  const tolerance = take(TOLERANCE);
  const fraction = take(FRACTION_WATTS);
  const watts = fraction ? null : take(WATTS);
  const volts = take(VOLTS);
  const amperes = take(AMPERES);
  const percent = tolerance ? toFloat(tolerance[1]) : null;
  return {
    tolerancePercent: percent !== null && percent >= 0.001 && percent <= 50 ? percent : null,
    ratedVolts: volts ? toFloat(volts[2]) * (volts[3] ? 1000 : 1) : null,
    ratedWatts: fraction
      ? Number(fraction[2]) / Number(fraction[3])
      : watts
        ? toFloat(watts[2]) * (watts[3] ? 0.001 : 1)
        : null,
    ratedAmperes: amperes ? toFloat(amperes[2]) * (amperes[3] ? 0.001 : 1) : null,
    rest: rest
      .replace(/\s+/g, ' ')
      .replace(/^[\s/,;*]+|[\s/,;*]+$/g, '')
      .trim(),
  };
}
