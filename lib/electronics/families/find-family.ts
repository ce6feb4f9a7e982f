/** Every family carried, by id. */
import { BIPOLAR_FAMILIES } from './bipolar-transistors';
import { DIODE_FAMILIES } from './diodes';
import type { Family, FamilyGroup } from './family';
import { FIELD_EFFECT_FAMILIES } from './field-effect-transistors';
import { LOGIC_4000_FAMILIES } from './logic-4000';
import { LOGIC_74_FAMILIES } from './logic-74';
import { OP_AMP_FAMILIES } from './op-amps';
import { OPTOCOUPLER_FAMILIES } from './optocouplers';
import { OTA_COMPARATOR_TIMER_FAMILIES } from './ota-comparator-timer';
import { REGULATOR_FAMILIES, VOLTAGE_REFERENCE_FAMILIES } from './regulators';
import { SWITCH_FAMILIES } from './switches';
import { SOUND_FAMILIES } from './vco-vcf-delay';
import { ZENER_FAMILIES } from './zeners';

const ALL: readonly Family[] = [
  ...LOGIC_4000_FAMILIES,
  ...LOGIC_74_FAMILIES,
  ...SWITCH_FAMILIES,
  ...OP_AMP_FAMILIES,
  ...OTA_COMPARATOR_TIMER_FAMILIES,
  ...SOUND_FAMILIES,
  ...REGULATOR_FAMILIES,
  ...VOLTAGE_REFERENCE_FAMILIES,
  ...BIPOLAR_FAMILIES,
  ...FIELD_EFFECT_FAMILIES,
  ...DIODE_FAMILIES,
  ...ZENER_FAMILIES,
  ...OPTOCOUPLER_FAMILIES,
];

const BY_ID: ReadonlyMap<string, Family> = new Map(ALL.map((family) => [family.id, family]));

/** @returns the family of that id, or null where none is carried */
export function findFamily(id: string): Family | null {
  return BY_ID.get(id) ?? null;
}

/** Every family carried, or those of one group, in the order of the tables. */
export function listFamilies(group?: FamilyGroup): readonly Family[] {
  return group === undefined ? ALL : ALL.filter((family) => family.group === group);
}
