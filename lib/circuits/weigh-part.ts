/** One part against one line: the checks of lib/electronics with the workshop's own safety mark, and how far the value is off. Pure. */
import type { PartSpec } from '@/lib/electronics/part-spec';
import { toNumber } from '@/lib/electronics/quantity';
import { assess, type Assessment, type StandInContext, type Verdict } from '@/lib/electronics/stand-in/assess';
import { fail } from '@/lib/electronics/stand-in/check';
import { partKeyOf } from './part-spec-schema';

export interface Weighed extends Assessment {
  /** Offered value against the asked one, in percent; null where either has none. */
  readonly deviationPercent: number | null;
}

/** @param safety the catalogue's mark: a mains or isolation part stands in for nothing */
export function weighPart(wanted: PartSpec, offered: PartSpec, safety: boolean, context: StandInContext): Weighed {
  const found = assess(wanted, offered, { ...context, mounting: context.mounting ?? wanted.mounting });
  const deviationPercent = deviationOf(wanted, offered);
  if (found.verdict === 'drop-in' && isAskedFor(wanted, offered))
    return { ...found, verdict: 'same', deviationPercent };
  if (safety && found.verdict !== 'same' && found.verdict !== 'refused') {
    const mark = fail(
      'safety',
      wanted.text,
      offered.text,
      'The workshop keeps it as a mains or isolation part: it stands in for nothing. The local electrical code and a licensed person decide.',
    );
    return { verdict: 'refused', checks: [...found.checks, mark], deviationPercent };
  }
  return { ...found, deviationPercent };
}

function deviationOf({ value: asked }: PartSpec, { value: offered }: PartSpec): number | null {
  if (asked === null || offered === null || asked.unit !== offered.unit || asked.significand === 0) return null;
  return Number(((toNumber(offered) / toNumber(asked) - 1) * 100).toPrecision(6));
}

/** Everything that was asked is said of the part: `100k 1 %` is answered by a `100k 1 % 0.25 W`, `TL072` by a `TL072CP`. */
function isAskedFor(wanted: PartSpec, offered: PartSpec): boolean {
  if (wanted.doubts.length > 0 || (wanted.value === null && wanted.partNumber === null)) return false;
  const fields = [
    'tolerancePercent',
    'ratedVolts',
    'ratedWatts',
    'ratedAmperes',
    'dielectric',
    'technology',
    'taper',
    'mounting',
    'package',
  ] as const;
  if (fields.some((field) => wanted[field] !== null && wanted[field] !== offered[field])) return false;
  if (wanted.value !== null && deviationOf(wanted, offered) !== 0) return false;
  if (wanted.partNumber === null) return true;
  return (
    offered.partNumber !== null &&
    wanted.family === offered.family &&
    partKeyOf(offered.partNumber).includes(partKeyOf(wanted.partNumber))
  );
}

const ORDER: Readonly<Record<Verdict, number>> = { same: 0, 'drop-in': 1, 'with-effect': 2, ask: 3, refused: 4 };

export interface Ranked {
  readonly partId: string;
  readonly verdict: Verdict;
  readonly deviationPercent: number | null;
  /** Units on the shelf that nobody has reserved. */
  readonly free: number;
  /** Somebody took this part for a line alike before. */
  readonly remembered: boolean;
  readonly outcomes: readonly string[];
}

/** Best first: what was taken before (where it is on the shelf and not refused here), verdict, enough on the shelf, anything on the shelf, fewest remarks, nearest value, id. */
export function compareRank(needed: number) {
  const key = (one: Ranked): readonly number[] => [
    one.remembered && one.verdict !== 'refused' && one.free > 0 ? 0 : 1,
    ORDER[one.verdict],
    one.free >= needed && one.free > 0 ? 0 : one.free > 0 ? 1 : 2,
    Math.abs(one.deviationPercent ?? 0),
    one.outcomes.filter((outcome) => outcome !== 'pass').length,
  ];
  return (a: Ranked, b: Ranked): number => {
    const [left, right] = [key(a), key(b)];
    for (let place = 0; place < left.length; place += 1) {
      const difference = (left[place] ?? 0) - (right[place] ?? 0);
      if (difference !== 0) return difference;
    }
    return a.partId < b.partId ? -1 : a.partId > b.partId ? 1 : 0;
  };
}
