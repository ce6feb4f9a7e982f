/** Stand-in checks for parts replaced by their own kind only: OTA, comparator, timer, sound chips, references, arrays. */
import type { ExactIcFamily } from '../families/family';
import { type Check, effect, fail, highestRail, pass, spanOf, type StandInContext, weighed } from './check';
import { checkUnits } from './assess-logic';
import { comparePins, nameOf } from './pin-comparison';
import { checkSupply } from './supply-check';

export function assessExactIc(wanted: ExactIcFamily, offered: ExactIcFamily, context: StandInContext): Check[] {
  const near = wanted.near[offered.id];
  if (near === undefined && wanted.unitFunction !== offered.unitFunction) {
    return [
      fail(
        'unit-function',
        wanted.title,
        offered.title,
        `A ${nameOf(offered)} does another thing than a ${nameOf(wanted)}.`,
      ),
    ];
  }
  const volts = wanted.group === 'timer' ? highestRail(context.rails) : spanOf(context.rails);
  const known = offered.supply.maximumVolts !== null || wanted.supply.maximumVolts !== null;
  return [
    near === undefined
      ? effect(
          'unit-function',
          wanted.title,
          offered.title,
          `The ${nameOf(offered)} does the same job; compare the datasheets’ figures.`,
        )
      : weighed(effect('unit-function', wanted.title, offered.title, near.value), near),
    checkUnits(wanted.units, offered.units),
    comparePins(wanted, offered),
    ...(known ? [checkSupply(wanted.supply, offered.supply, volts, nameOf(offered))] : []),
    ...output(wanted, offered, context),
  ];
}

function output(wanted: ExactIcFamily, offered: ExactIcFamily, { use }: StandInContext): Check[] {
  const [a, b] = [wanted.output, offered.output];
  if (a === null || b === null || a.value === b.value) return [];
  const words = [a.value, b.value] as const;
  if (a.value === 'push-pull' && b.value === 'light-drive') {
    return use === 'power'
      ? [fail('drive', ...words, 'It cannot drive a relay, lamp or speaker as the bipolar one does.')]
      : [effect('drive', ...words, 'It drives a few milliamperes only: LEDs and logic, no relays.')];
  }
  if (a.value === 'light-drive' && b.value === 'push-pull')
    return [pass('drive', ...words, 'It drives more than needed.')];
  return [fail('output-kind', ...words, 'Its output works another way.')];
}

/** Different groups: an amplifier is no comparator, a comparator no amplifier. */
export function crossGroup(
  wantedTitle: string,
  offeredTitle: string,
  wantedGroup: string,
  offeredGroup: string,
): Check {
  if (wantedGroup === 'op-amp' && offeredGroup === 'comparator') {
    return fail(
      'unit-function',
      wantedTitle,
      offeredTitle,
      'A comparator does not amplify, and its open collector needs a pull-up.',
    );
  }
  if (wantedGroup === 'comparator' && offeredGroup === 'op-amp') {
    return fail(
      'unit-function',
      wantedTitle,
      offeredTitle,
      'An op-amp as comparator is slow, and it drives where an open collector was wanted.',
    );
  }
  return fail('unit-function', wantedTitle, offeredTitle, `A ${offeredTitle} is no ${wantedTitle}.`);
}
