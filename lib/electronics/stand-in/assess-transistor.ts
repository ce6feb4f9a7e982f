/** Stand-in checks for bipolar transistors, JFETs and MOSFETs. */
import type { BipolarFamily, Fact, FetFamily } from '../families/family';
import type { PartSpec } from '../part-spec';
import {
  type Check,
  effect,
  fail,
  measure,
  pass,
  remark,
  spanOf,
  type StandInContext,
  unknown,
  weighed,
} from './check';
import { compareLeads } from './pin-comparison';

export function assessBipolar(
  wanted: BipolarFamily,
  offered: BipolarFamily,
  specs: readonly [PartSpec, PartSpec],
  context: StandInContext,
): Check[] {
  if (wanted.matchedPair !== offered.matchedPair) {
    return wanted.matchedPair
      ? [
          fail(
            'matched-pair',
            'matched pair',
            'single',
            'A matched pair is replaced by a matched pair: single transistors drift apart and the pitch with them.',
          ),
        ]
      : [
          fail(
            'matched-pair',
            'single',
            'matched pair',
            'A pair in one case does not fit a single transistor’s place.',
          ),
        ];
  }
  return [
    wanted.polarity === offered.polarity
      ? pass('polarity', wanted.polarity, offered.polarity, 'Same polarity.')
      : fail('polarity', wanted.polarity, offered.polarity, `A ${offered.polarity} transistor conducts the other way.`),
    wanted.darlington === offered.darlington
      ? pass('darlington', yes(wanted.darlington), yes(offered.darlington), 'Same build.')
      : fail(
          'darlington',
          yes(wanted.darlington),
          yes(offered.darlington),
          'A Darlington drops two diode voltages and has a hundred times the gain: neither replaces the other.',
        ),
    compareLeads(wanted, offered, true),
    limit('voltage', wanted.collectorEmitterVolts, offered.collectorEmitterVolts, spanOf(context.rails), 'V'),
    current(wanted.collectorAmperes, offered.collectorAmperes, context),
    gain(wanted, offered, specs),
    ...noise(wanted, offered, context),
    ...(wanted.matchedPair
      ? [
          unknown(
            'matched-pair',
            'matched pair',
            'matched pair',
            'Is its matching as tight as the circuit needs? The tables do not say.',
          ),
        ]
      : []),
  ];
}

const yes = (darlington: boolean): string => (darlington ? 'Darlington' : 'single');

/** A lower limit than the wanted part's serves when the rails leave a margin of a fifth. */
export function limit(
  check: string,
  wanted: Fact<number> | null,
  offered: Fact<number> | null,
  stress: number | null,
  unit: string,
): Check {
  if (offered === null) return unknown(check, 'not known', 'not known', `Its ${check} limit is not in the tables.`);
  const words = [wanted === null ? 'not known' : measure(wanted.value, unit), measure(offered.value, unit)] as const;
  if (wanted !== null && offered.value >= wanted.value)
    return weighed(pass(check, ...words, 'It bears as much.'), offered);
  if (stress === null) return unknown(check, ...words, 'It bears less than the wanted part: which rails are there?');
  if (offered.value < stress)
    return weighed(
      fail(
        check,
        ...words,
        `The circuit has ${measure(stress, unit)} across it; it bears ${measure(offered.value, unit)}.`,
      ),
      offered,
    );
  if (offered.value * 0.8 < stress)
    return weighed(
      effect(
        check,
        ...words,
        `It bears less than the wanted part and little more than the ${measure(stress, unit)} of the circuit.`,
      ),
      offered,
    );
  return weighed(
    remark(check, ...words, `It bears less than the wanted part, but more than enough for ${measure(stress, unit)}.`),
    offered,
  );
}

function current(wanted: Fact<number> | null, offered: Fact<number> | null, { use }: StandInContext): Check {
  if (offered === null || wanted === null)
    return unknown('current', 'not known', 'not known', 'Its current limit is not in the tables.');
  const words = [measure(wanted.value, 'A'), measure(offered.value, 'A')] as const;
  if (offered.value >= wanted.value) return weighed(pass('current', ...words, 'It carries as much.'), offered);
  if (use === 'power') return weighed(fail('current', ...words, 'In a power stage it is too small.'), offered);
  if (use === null) return unknown('current', ...words, 'It carries less: how much current does the place ask for?');
  return offered.value >= 0.4 * wanted.value || offered.value >= 0.1
    ? remark('current', ...words, 'It carries less, but a small-signal place draws milliamperes.')
    : unknown('current', ...words, 'It carries much less: how much current does the place ask for?');
}

/** The gain letter or number that follows the type: `BC547B`, `BC337-25`, `2SC1815GR`. */
function gainGroup(family: BipolarFamily, spec: PartSpec): string | null {
  const written = (spec.partNumber ?? spec.text).toUpperCase().replace(/[\s-]/g, '');
  const head = family.id.toUpperCase();
  const at = written.indexOf(head);
  const rest = at >= 0 ? written.slice(at + head.length) : '';
  const keys = Object.keys(family.gainGroups).sort((a, b) => b.length - a.length);
  return keys.find((key) => rest.startsWith(key)) ?? null;
}

export function gain(
  wanted: BipolarFamily,
  offered: BipolarFamily,
  [wantedSpec, offeredSpec]: readonly [PartSpec, PartSpec],
): Check {
  const [groupA, groupB] = [gainGroup(wanted, wantedSpec), gainGroup(offered, offeredSpec)];
  const a = (groupA === null ? undefined : wanted.gainGroups[groupA]) ?? wanted.gain?.value ?? null;
  const b = (groupB === null ? undefined : offered.gainGroups[groupB]) ?? offered.gain?.value ?? null;
  if (a === null || b === null)
    return unknown('gain-group', 'not known', 'not known', 'Its gain is not in the tables.');
  const say = (group: string | null, range: readonly [number, number]): string =>
    `${group === null ? '' : `${group}: `}${range[0]}–${range[1]}`;
  const words = [say(groupA, a), say(groupB, b)] as const;
  if (groupA !== null && groupB === null && Object.keys(offered.gainGroups).length > 0 && b[0] < a[0])
    return unknown('gain-group', ...words, `Which gain group is it? ${groupA} was wanted.`);
  if (b[1] < a[0]) return effect('gain-group', ...words, 'It has less gain: bias points and thresholds move.');
  if (b[0] > a[1]) return effect('gain-group', ...words, 'It has more gain: bias points and thresholds move.');
  if (groupA !== null && groupA !== groupB)
    return effect('gain-group', ...words, 'Another gain group: check stages that lean on the gain.');
  return pass('gain-group', ...words, 'Gain is of the same order.');
}

function noise(wanted: BipolarFamily, offered: BipolarFamily, { use }: StandInContext): Check[] {
  if (!wanted.lowNoise || offered.lowNoise) return [];
  const words = ['low noise', 'general purpose'] as const;
  return [
    use === 'audio'
      ? effect('noise', ...words, 'It is not selected for low noise: an input stage hisses more.')
      : remark('noise', ...words, 'It is not selected for low noise.'),
  ];
}

export function assessFet(wanted: FetFamily, offered: FetFamily, context: StandInContext): Check[] {
  return [
    wanted.channel === offered.channel
      ? pass('polarity', `${wanted.channel}-channel`, `${offered.channel}-channel`, 'Same channel.')
      : fail('polarity', `${wanted.channel}-channel`, `${offered.channel}-channel`, 'It conducts the other way.'),
    compareLeads(wanted, offered, true),
    limit('voltage', wanted.drainSourceVolts, offered.drainSourceVolts, spanOf(context.rails), 'V'),
    ...(wanted.group === 'jfet'
      ? [spread(wanted, offered)]
      : [current(wanted.drainAmperes, offered.drainAmperes, context)]),
  ];
}

function spread(wanted: FetFamily, offered: FetFamily): Check {
  const [a, b] = [wanted.saturationMilliamperes, offered.saturationMilliamperes];
  if (a === null || b === null)
    return unknown(
      'saturation-current',
      'not known',
      'not known',
      'Its saturation current is not in the tables: measure it.',
    );
  const words = [`${a.value[0]}–${a.value[1]} mA`, `${b.value[0]}–${b.value[1]} mA`] as const;
  if (b.value[1] < a.value[0] || b.value[0] > a.value[1])
    return weighed(
      fail('saturation-current', ...words, 'Its saturation current lies wholly outside the wanted range.'),
      a,
      b,
    );
  return unknown(
    'saturation-current',
    ...words,
    'JFETs spread five to one within a type: measure saturation current and cut-off, and choose.',
  );
}
