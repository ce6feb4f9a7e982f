/** Two part numbers of one family: only maker, grade and gain group can differ. */
import type { Family } from '../families/family';
import type { PartSpec } from '../part-spec';
import { gain } from './assess-transistor';
import { type Check, effect, pass, remark, type StandInContext, unknown } from './check';

export function assessSameFamily(
  family: Family,
  specs: readonly [PartSpec, PartSpec],
  { use }: StandInContext,
): Check[] {
  const [wanted, offered] = specs;
  const same = pass(
    'part',
    wanted.text,
    offered.text,
    `Both are ${family.title}: the same type from another maker or in another grade.`,
  );
  switch (family.group) {
    case 'logic':
      return family.schmittInputs.value && use === 'timing' && makerDiffers(specs)
        ? [
            same,
            effect(
              'schmitt-inputs',
              wanted.text,
              offered.text,
              'Makers set the thresholds differently: an RC oscillator may shift by some semitones.',
            ),
          ]
        : [same];
    case 'bipolar':
      return [
        same,
        gain(family, family, specs),
        ...(family.matchedPair
          ? []
          : [remark('lead-order', wanted.text, offered.text, 'Compare the maker’s drawing before bending legs.')]),
      ];
    case 'jfet':
      return [
        same,
        unknown(
          'saturation-current',
          wanted.text,
          offered.text,
          'JFETs spread five to one within a type: measure and choose.',
        ),
      ];
    default:
      return [same];
  }
}

/** Letters before the number name the maker; a bare number names none, and then nothing is said. */
function makerDiffers([wanted, offered]: readonly [PartSpec, PartSpec]): boolean {
  const maker = (spec: PartSpec): string => /^[A-Z]+/i.exec(spec.partNumber ?? spec.text)?.[0].toUpperCase() ?? '';
  return maker(wanted) !== '' && maker(offered) !== '' && maker(wanted) !== maker(offered);
}
