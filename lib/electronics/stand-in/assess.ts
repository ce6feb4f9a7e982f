/**
 * Whether one part may stand in for another: every check that the part's group asks for, each with a sentence, and the
 * verdict they come to. No check invents a fact: what the tables do not hold is `unknown`, and the verdict `ask`.
 */
import type { Family } from '../families/family';
import { findFamily } from '../families/find-family';
import type { PartSpec } from '../part-spec';
import { assessCapacitor } from './assess-capacitor';
import { assessDiode, assessZener } from './assess-diode';
import { assessExactIc, crossGroup } from './assess-exact-ic';
import { assessLogic, assessSwitch } from './assess-logic';
import { checkMounting, checkPackage } from './assess-mounting';
import { assessOpAmp } from './assess-op-amp';
import { assessOptocoupler } from './assess-optocoupler';
import { assessCrystal, assessInductor, assessPotentiometer, assessResistor } from './assess-passive';
import { assessRegulator } from './assess-regulator';
import { assessSafety, safetyRemarks } from './assess-safety';
import { assessSameFamily } from './assess-same-family';
import { assessBipolar, assessFet } from './assess-transistor';
import { type Assessment, type Check, fail, pass, type StandInContext, unknown, verdictOf } from './check';

export type { Assessment, Check, Outcome, StandInContext, Use, Verdict } from './check';

/**
 * @param wanted what the parts list asks for, as readPartText gives it
 * @param offered what is at hand, likewise
 * @param context the circuit's rails in signed volts, the line's use, mounting and tolerance
 * @returns the verdict and the findings; `assess(x, x)` is always `same`
 */
export function assess(wanted: PartSpec, offered: PartSpec, context: StandInContext): Assessment {
  if (identical(wanted, offered)) {
    return { verdict: 'same', checks: [pass('part', wanted.text, offered.text, 'The same part.')] };
  }
  const checks = gather(wanted, offered, context);
  return { verdict: verdictOf(checks), checks };
}

function identical(a: PartSpec, b: PartSpec): boolean {
  if (tidy(a.text) === tidy(b.text) && a.kind === b.kind) return true;
  const says = a.partNumber !== null || a.value !== null;
  return (
    says &&
    a.doubts.length === 0 &&
    b.doubts.length === 0 &&
    fingerprint(a) === fingerprint(b) &&
    leftover(a) === leftover(b)
  );
}

const tidy = (text: string): string => text.trim().replace(/\s+/g, ' ').toUpperCase();

function fingerprint(spec: PartSpec): string {
  const {
    kind,
    value,
    tolerancePercent,
    ratedVolts,
    ratedWatts,
    ratedAmperes,
    dielectric,
    technology,
    taper,
    mounting,
    partNumber,
  } = spec;
  return JSON.stringify([
    kind,
    value,
    tolerancePercent,
    ratedVolts,
    ratedWatts,
    ratedAmperes,
    dielectric,
    technology,
    taper,
    mounting,
    spec.package,
    partNumber?.toUpperCase() ?? null,
  ]);
}

/** Words in the text that the fields do not hold, such as X2, dual or a colour: they tell parts apart. */
function leftover(spec: PartSpec): string {
  return spec.partNumber !== null && spec.value === null
    ? ''
    : tidy(spec.text)
        .split(' ')
        .filter((word) => /^(?:[XY][1-4]|DUAL|STEREO|TANDEM|QUAD|FUSIBLE|FLAMEPROOF|MAINS)$/.test(word))
        .sort()
        .join(' ');
}

function gather(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  const safety = assessSafety(wanted, offered, context);
  if (safety !== null) return safety;
  const families = [familyFor(wanted), familyFor(offered)] as const;
  const body = byFamily(families, [wanted, offered], context) ?? byKind(wanted, offered, context);
  return [
    ...body,
    ...checkMounting(wanted, offered, families, context),
    ...checkPackage(wanted, offered),
    ...safetyRemarks(wanted, offered, context),
  ];
}

function familyFor(spec: PartSpec): Family | null {
  return spec.family === null ? null : findFamily(spec.family);
}

function byFamily(
  [a, b]: readonly [Family | null, Family | null],
  specs: readonly [PartSpec, PartSpec],
  context: StandInContext,
): Check[] | null {
  if (a === null && b === null) return null;
  if (a === null || b === null) {
    const [wanted, offered] = specs;
    const apart = wanted.kind !== null && offered.kind !== null && wanted.kind !== offered.kind;
    if (apart) return [fail('kind', wanted.kind, offered.kind, `A ${offered.kind} is no ${wanted.kind}.`)];
    const name = (a === null ? wanted : offered).text;
    return [unknown('family', wanted.text, offered.text, `The tables do not know “${name}”: compare the datasheets.`)];
  }
  if (a.id === b.id) return assessSameFamily(a, specs, context);
  if (a.group === 'logic' && b.group === 'logic') return assessLogic(a, b, context);
  if (a.group === 'switch' && b.group === 'switch') return assessSwitch(a, b, context);
  if (a.group === 'op-amp' && b.group === 'op-amp') return assessOpAmp(a, b, context);
  if (a.group === 'regulator' && b.group === 'regulator') return assessRegulator(a, b, context);
  if (a.group === 'bipolar' && b.group === 'bipolar') return assessBipolar(a, b, specs, context);
  if (a.group === 'diode' && b.group === 'diode') return assessDiode(a, b, context);
  if (a.group === 'zener' && b.group === 'zener') return assessZener(a, b);
  if (a.group === 'optocoupler' && b.group === 'optocoupler') return assessOptocoupler(a, b);
  if ((a.group === 'jfet' || a.group === 'mosfet') && a.group === b.group) return assessFet(a, b, context);
  if (isExact(a) && isExact(b) && a.group === b.group) return assessExactIc(a, b, context);
  return [crossGroup(a.title, b.title, a.group, b.group)];
}

type Exact = Extract<Family, { readonly group: 'ota' | 'comparator' | 'timer' | 'sound' | 'reference' | 'array' }>;

function isExact(family: Family): family is Exact {
  return ['ota', 'comparator', 'timer', 'sound', 'reference', 'array'].includes(family.group);
}

function byKind(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  const [a, b] = [wanted.kind, offered.kind];
  if (a === null || b === null)
    return [unknown('kind', a ?? 'not known', b ?? 'not known', 'What kind of part is it?')];
  if (a !== b) return [fail('kind', a, b, `A ${b} is no ${a}.`)];
  switch (a) {
    case 'resistor':
      return assessResistor(wanted, offered, context);
    case 'capacitor':
      return assessCapacitor(wanted, offered, context);
    case 'potentiometer':
    case 'trimmer':
      return assessPotentiometer(wanted, offered, context);
    case 'inductor':
      return assessInductor(wanted, offered, context);
    case 'crystal':
      return assessCrystal(wanted, offered, context);
    default:
      return [
        unknown(
          'part',
          wanted.text,
          offered.text,
          'The tables hold no facts for this kind of part: a person must compare the two.',
        ),
      ];
  }
}
