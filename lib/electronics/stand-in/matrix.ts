/** Every family of a group wanted against every one offered, for the page and the command. */
import { listFamilies } from '../families/find-family';
import type { Family, FamilyGroup } from '../families/family';
import type { PartSpec } from '../part-spec';
import { assess } from './assess';
import type { StandInContext, Verdict } from './check';

export const MATRIX_GROUPS = [
  'op-amp',
  'logic',
  'switch',
  'timer',
  'comparator',
  'regulator',
  'bipolar',
  'diode',
] as const satisfies readonly FamilyGroup[];
export type MatrixGroup = (typeof MATRIX_GROUPS)[number];

export interface Matrix {
  readonly group: MatrixGroup;
  readonly rails: readonly number[];
  readonly use: StandInContext['use'];
  readonly families: readonly { readonly id: string; readonly title: string }[];
  /** `verdicts[wanted][offered]`, in the order of `families`. */
  readonly verdicts: readonly (readonly Verdict[])[];
}

export function isMatrixGroup(text: string): text is MatrixGroup {
  return MATRIX_GROUPS.some((group) => group === text);
}

/** The largest group holds some 140 families: about 20,000 assessments, well under a second. */
export function matrixOf(group: MatrixGroup, context: StandInContext): Matrix {
  const families = listFamilies(group);
  const specs = families.map(specOfFamily);
  return {
    group,
    rails: context.rails,
    use: context.use,
    families: families.map(({ id, title }) => ({ id, title })),
    verdicts: specs.map((wanted) => specs.map((offered) => assess(wanted, offered, context).verdict)),
  };
}

/** What a parts list says that names the bare family and nothing else. */
export function specOfFamily(family: Family): PartSpec {
  const name = family.id.toUpperCase();
  return {
    kind: family.kind,
    value: null,
    tolerancePercent: null,
    ratedVolts: null,
    ratedWatts: null,
    ratedAmperes: null,
    dielectric: null,
    technology: null,
    taper: null,
    mounting: null,
    package: null,
    partNumber: name,
    family: family.id,
    alternatives: [],
    fitted: true,
    doubts: [],
    text: name,
  };
}
