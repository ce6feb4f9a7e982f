/** The preferred values round an asked-for one, and which of them lie on the shelf. */
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import type { PartSpec } from '@/lib/electronics/part-spec';
import { roundToSeries } from '@/lib/electronics/preferred-values';
import { printQuantity } from '@/lib/electronics/print-quantity';
import { toDecimal, toNumber } from '@/lib/electronics/quantity';

const OFFERED_SERIES = ['E6', 'E12', 'E24', 'E48', 'E96'] as const;

export const preferredNear = z.object({
  series: z.enum(OFFERED_SERIES),
  /** As a builder writes it, such as 4.7 kΩ. */
  text: z.string(),
  /** Of the preferred value from the asked-for one. */
  deviationPercent: z.number(),
  /** Candidates of exactly that value with units nobody has reserved, best first. */
  partIds: z.array(id()),
});
export type PreferredNear = z.output<typeof preferredNear>;

interface Stocked {
  readonly part: { readonly id: string; readonly value: string | null; readonly unit: string | null };
  readonly free: number;
  readonly verdict: string;
}

/** One entry a series (IEC 60063), coarsest first; none where nothing of a value is asked for. */
export function preferredValuesNear(spec: PartSpec, candidates: readonly Stocked[]): PreferredNear[] {
  const asked = spec.value;
  if (asked === null || asked.significand <= 0) return [];
  return OFFERED_SERIES.map((series) => {
    const rounded = roundToSeries(asked, series);
    const onShelf = candidates.filter(
      ({ part, free, verdict }) =>
        free > 0 &&
        verdict !== 'refused' &&
        part.unit === rounded.unit &&
        part.value !== null &&
        Number(part.value) === Number(toDecimal(rounded)),
    );
    return {
      series,
      text: printQuantity(rounded),
      deviationPercent: (toNumber(rounded) / toNumber(asked) - 1) * 100,
      partIds: onShelf.map(({ part }) => part.id),
    };
  });
}
