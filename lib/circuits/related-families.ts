/** Families worth laying beside a wanted one, so that the checks can offer them or say why not. Pure. */
import type { Family } from '@/lib/electronics/families/family';
import { findFamily, listFamilies } from '@/lib/electronics/families/find-family';

const known = new Map<string, readonly string[]>();

/** @returns ids of the families that do the same job, the wanted one first; empty where the tables don't know it */
export function relatedFamilies(familyId: string): readonly string[] {
  const kept = known.get(familyId);
  if (kept) return kept;
  const wanted = findFamily(familyId);
  const related =
    wanted === null
      ? []
      : [
          wanted.id,
          ...listFamilies(wanted.group)
            .filter((other) => other.id !== wanted.id && doesTheSameJob(wanted, other))
            .map((other) => other.id),
        ];
  known.set(familyId, related);
  return related;
}

function doesTheSameJob(a: Family, b: Family): boolean {
  if ('unitFunction' in a && 'unitFunction' in b) return a.unitFunction === b.unitFunction;
  if (a.group === 'op-amp' && b.group === 'op-amp') return a.units === b.units;
  if (a.group === 'regulator' && b.group === 'regulator')
    return a.polarity === b.polarity && a.outputVolts === b.outputVolts;
  if (a.group === 'bipolar' && b.group === 'bipolar')
    return a.polarity === b.polarity && a.darlington === b.darlington && a.matchedPair === b.matchedPair;
  if ((a.group === 'jfet' || a.group === 'mosfet') && a.group === b.group) return a.channel === b.channel;
  if (a.group === 'diode' && b.group === 'diode') return a.diodeType.value === b.diodeType.value;
  if (a.group === 'zener' && b.group === 'zener') return a.zenerVolts.value === b.zenerVolts.value;
  if (a.group === 'optocoupler' && b.group === 'optocoupler') return a.output === b.output;
  return false;
}
