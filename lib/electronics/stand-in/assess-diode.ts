/** Stand-in checks for diodes and Zener diodes. */
import type { DiodeFamily, DiodeType, ZenerFamily } from '../families/family';
import {
  type Check,
  effect,
  fail,
  measure,
  pass,
  remark,
  spanOf,
  type StandInContext,
  type Use,
  unknown,
  weighed,
} from './check';
import { nameOf, samePins } from './pin-comparison';
import { limit } from './assess-transistor';

const WORDS: Readonly<Record<DiodeType, string>> = {
  switching: 'switching, 0.65 V',
  rectifier: 'rectifier, 0.7 V, slow',
  'schottky-small': 'Schottky, 0.3 V',
  'schottky-power': 'Schottky rectifier, 0.3 V',
  germanium: 'germanium, 0.3 V, leaky',
  'low-leakage': 'low leakage, 0.65 V',
};

export function assessDiode(wanted: DiodeFamily, offered: DiodeFamily, context: StandInContext): Check[] {
  return [
    kind(wanted.diodeType.value, offered.diodeType.value, context.use),
    limit('voltage', wanted.reverseVolts, offered.reverseVolts, spanOf(context.rails), 'V'),
    current(wanted, offered, context.use),
    leads(wanted, offered),
  ];
}

function leads(wanted: DiodeFamily, offered: DiodeFamily): Check {
  const [a, b] = [wanted.pinOut, offered.pinOut];
  if (a === null || b === null)
    return unknown(
      'pin-out',
      a?.value.package ?? 'not known',
      b?.value.package ?? 'not known',
      'It holds several diodes, or its leads are not in the tables: compare the drawings.',
    );
  const words = [
    `${a.value.pins.join(' ')} (${a.value.package})`,
    `${b.value.pins.join(' ')} (${b.value.package})`,
  ] as const;
  return samePins(a.value, b.value)
    ? pass('pin-out', ...words, 'Ring to ring.')
    : fail('pin-out', ...words, 'Its case has other leads.');
}

/** What a diode of one kind does in the place of another. */
function kind(a: DiodeType, b: DiodeType, use: Use | null): Check {
  const words = [WORDS[a], WORDS[b]] as const;
  if (a === b) return pass('diode-kind', ...words, 'Same kind of diode.');
  const schottky = (type: DiodeType): boolean => type === 'schottky-small' || type === 'schottky-power';
  const silicon = (type: DiodeType): boolean => type === 'switching' || type === 'rectifier' || type === 'low-leakage';
  if (silicon(a) && schottky(b)) {
    if (use === 'power' && a === 'rectifier')
      return effect(
        'diode-kind',
        ...words,
        'A Schottky rectifier drops less and leaks more; as protection or rectifier it serves.',
      );
    if (use === 'logic' && a === 'switching')
      return effect(
        'diode-kind',
        ...words,
        'A Schottky diode drops half as much and leaks more; between logic levels it serves.',
      );
    if (use === null)
      return unknown(
        'diode-kind',
        ...words,
        'Does its forward drop shape a wave or set a level? Then a Schottky diode is wrong.',
      );
    return fail(
      'diode-kind',
      ...words,
      'A Schottky diode drops 0.3 V, not 0.65 V: wave folders, clippers and thresholds move, and it leaks.',
    );
  }
  if (schottky(a) && silicon(b)) {
    if (use === 'power' && a === 'schottky-power' && b === 'rectifier')
      return effect('diode-kind', ...words, 'It drops about 0.4 V more of the rail.');
    return fail('diode-kind', ...words, 'A silicon diode drops twice as much: it clamps and protects too late.');
  }
  if (schottky(a) && schottky(b)) {
    return b === 'schottky-power'
      ? effect('diode-kind', ...words, 'A power Schottky has much more capacitance and leakage.')
      : remark('diode-kind', ...words, 'A small Schottky does it if the current allows.');
  }
  if (a === 'germanium' || b === 'germanium') {
    if (a === 'germanium' && b === 'schottky-small')
      return effect(
        'diode-kind',
        ...words,
        'A small Schottky comes nearest to germanium, with a harder knee: it sounds a little different.',
      );
    return fail(
      'diode-kind',
      ...words,
      'Germanium drops 0.3 V with a soft knee and leaks: nothing in silicon behaves so.',
    );
  }
  return siliconForSilicon(a, b, use, words);
}

function siliconForSilicon(a: DiodeType, b: DiodeType, use: Use | null, words: readonly [string, string]): Check {
  if (b === 'rectifier') {
    return use === 'power'
      ? remark('diode-kind', ...words, 'On a rail a rectifier serves.')
      : fail('diode-kind', ...words, 'A rectifier is slow and has much capacitance: no good above a few kilohertz.');
  }
  if (a === 'low-leakage') {
    if (use === 'logic' || use === 'power') return remark('diode-kind', ...words, 'Here its leakage does not matter.');
    return use === 'timing' || use === 'control'
      ? fail('diode-kind', ...words, 'It leaks more than the hold or integrator bears.')
      : unknown('diode-kind', ...words, 'Was the low leakage needed for a hold or a high resistance?');
  }
  return remark(
    'diode-kind',
    ...words,
    a === 'rectifier' ? 'A switching diode does it if the current allows.' : 'Lower leakage does no harm.',
  );
}

function current(wanted: DiodeFamily, offered: DiodeFamily, use: Use | null): Check {
  const [a, b] = [wanted.forwardAmperes, offered.forwardAmperes];
  if (a === null || b === null)
    return unknown('current', 'not known', 'not known', 'Its current limit is not in the tables.');
  const words = [measure(a.value, 'A'), measure(b.value, 'A')] as const;
  if (b.value >= a.value) return weighed(pass('current', ...words, 'It carries as much.'), b);
  const signal = wanted.diodeType.value !== 'rectifier' && wanted.diodeType.value !== 'schottky-power';
  if (signal && use !== 'power' && b.value >= 0.5 * a.value)
    return remark('current', ...words, 'It carries a little less; signals need milliamperes.');
  return weighed(
    fail(
      'current',
      ...words,
      `It carries ${measure(b.value, 'A')} where the wanted part carries ${measure(a.value, 'A')}.`,
    ),
    b,
  );
}

export function assessZener(wanted: ZenerFamily, offered: ZenerFamily): Check[] {
  const [a, b] = [wanted.zenerVolts.value, offered.zenerVolts.value];
  const words = [measure(a, 'V'), measure(b, 'V')] as const;
  const off = Math.abs(b / a - 1);
  const [powerA, powerB] = [wanted.watts.value, offered.watts.value];
  const powerWords = [measure(powerA, 'W'), measure(powerB, 'W')] as const;
  return [
    off < 0.005
      ? pass('zener-voltage', ...words, 'Same Zener voltage.')
      : off <= 0.03
        ? effect('zener-voltage', ...words, 'Its voltage differs a little, within the usual 5 %.')
        : fail('zener-voltage', ...words, `It holds ${measure(b, 'V')} where ${measure(a, 'V')} is wanted.`),
    powerB >= powerA
      ? pass('power', ...powerWords, 'It bears as much power.')
      : unknown('power', ...powerWords, `It bears ${measure(powerB, 'W')} only: how much current does it carry?`),
    ...(a < 5 && wanted.id !== offered.id && powerA !== powerB
      ? [
          effect(
            'knee',
            nameOf(wanted),
            nameOf(offered),
            'Below 5 V the knee is soft and the series are tested at different currents: the voltage in the circuit differs.',
          ),
        ]
      : []),
    leadsOfZener(wanted, offered),
  ];
}

function leadsOfZener(wanted: ZenerFamily, offered: ZenerFamily): Check {
  const [a, b] = [wanted.pinOut?.value, offered.pinOut?.value];
  if (a === undefined || b === undefined) return unknown('pin-out', 'not known', 'not known', 'Compare the drawings.');
  return samePins(a, b)
    ? pass('pin-out', a.package, b.package, 'Ring to ring.')
    : fail('pin-out', a.package, b.package, 'Its case has other leads.');
}
