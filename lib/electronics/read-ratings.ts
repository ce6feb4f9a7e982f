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
const START = String.raw`(^|[\s/*,;@(xX-])`;
const END = String.raw`(?=$|[\s,;)\]/*-])`;
/** `+80/-20%` is lopsided and has no ± figure; it is taken away unread. */
const LOPSIDED = /\+\d+\s*%?\s*\/\s*-\d+\s*%/;
const TOLERANCE = new RegExp(String.raw`(?:±|\+/?-)?\s?${N}\s?%`);
const VOLTS = new RegExp(String.raw`${START}${N}\s?(k)?(?:V(?:DC|AC|R)?|volts?)${END}`, 'i');
/** `5V1` as Zener diodes and regulators are named. */
const LETTER_VOLTS = new RegExp(String.raw`${START}(\d{1,2})V(\d{1,2})${END}`, 'i');
const FRACTION_WATTS = new RegExp(String.raw`${START}(\d)\s?/\s?(\d{1,2})\s?W(?:atts?)?${END}`, 'i');
const WATTS = new RegExp(String.raw`${START}${N}\s?(m)?W(?:atts?)?${END}`, 'i');
const AMPERES = new RegExp(String.raw`${START}${N}\s?(m)?A(?:mps?)?${END}`);

/** Beyond these a number with such a letter is a type: 3296W is a trimmer, 9013A no current. */
const MOST_VOLTS = 10_000;
const MOST_WATTS = 300;
const MOST_AMPERES = 100;

const toFloat = (text: string | undefined): number => Number((text ?? '').replace(',', '.'));

/** Reads and removes ratings; a number counts as one only with its unit. Percent within 0.001 … 50, volts to 10 kV. */
export function readRatings(text: string): Ratings {
  let rest = text.replace(LOPSIDED, ' ');
  const take = <T>(pattern: RegExp, read: (found: RegExpExecArray) => T | null): T | null => {
    const found = pattern.exec(rest);
    const value = found === null ? null : read(found);
    if (found !== null && value !== null)
      rest = `${rest.slice(0, found.index)} ${rest.slice(found.index + found[0].length)}`;
    return value;
  };
  const within = (value: number, least: number, most: number) => (value >= least && value <= most ? value : null);
  const tolerancePercent = take(TOLERANCE, (found) => within(toFloat(found[1]), 0.001, 50));
  const ratedWatts =
    take(FRACTION_WATTS, (found) => within(Number(found[2]) / Number(found[3]), 0.001, MOST_WATTS)) ??
    take(WATTS, (found) => within(toFloat(found[2]) * (found[3] ? 0.001 : 1), 0.001, MOST_WATTS));
  const ratedVolts =
    take(VOLTS, (found) => within(toFloat(found[2]) * (found[3] ? 1000 : 1), 0.1, MOST_VOLTS)) ??
    take(LETTER_VOLTS, (found) => Number(`${found[2] ?? ''}.${found[3] ?? ''}`));
  const ratedAmperes = take(AMPERES, (found) =>
    within(Number((toFloat(found[2]) * (found[3] ? 0.001 : 1)).toPrecision(12)), 0.001, MOST_AMPERES),
  );
  const tidy = rest
    .replace(/\s+/g, ' ')
    .replace(/^[\s/,;*]+|[\s/,;*]+$/g, '')
    .trim();
  return { tolerancePercent, ratedVolts, ratedWatts, ratedAmperes, rest: tidy };
}
