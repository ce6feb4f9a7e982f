/** Stand-in checks for capacitors: what the dielectric means for the use, and voltage with derating. */
import type { Dielectric, PartSpec } from '../part-spec';
import { toNumber } from '../quantity';
import { compareTolerance, compareValue } from './assess-value';
import {
  type Check,
  effect,
  fail,
  highestRail,
  measure,
  pass,
  remark,
  spanOf,
  type StandInContext,
  unknown,
} from './check';

type DielectricClass = 'stable' | 'class-2' | 'class-3' | 'ceramic' | 'aluminium' | 'bipolar' | 'polymer' | 'tantalum';

const CLASSES: Readonly<Record<Dielectric, DielectricClass>> = {
  C0G: 'stable',
  film: 'stable',
  polyester: 'stable',
  polypropylene: 'stable',
  polystyrene: 'stable',
  polycarbonate: 'stable',
  mica: 'stable',
  X5R: 'class-2',
  X6S: 'class-2',
  X7R: 'class-2',
  X7S: 'class-2',
  X8R: 'class-2',
  Y5V: 'class-3',
  Y5U: 'class-3',
  Z5U: 'class-3',
  ceramic: 'ceramic',
  aluminium: 'aluminium',
  'aluminium-bipolar': 'bipolar',
  polymer: 'polymer',
  tantalum: 'tantalum',
};

const POLARISED: readonly DielectricClass[] = ['aluminium', 'polymer', 'tantalum'];

/** Share of the rating that may be used; maker's advice for tantalum and class 2 (read), common practice for the rest. */
const DERATING: Readonly<Record<DielectricClass, number>> = {
  stable: 0.75,
  'class-2': 0.5,
  'class-3': 0.5,
  ceramic: 0.5,
  aluminium: 0.8,
  bipolar: 0.8,
  polymer: 0.8,
  tantalum: 0.5,
};

export function assessCapacitor(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  return [
    compareValue(wanted, offered, context),
    dielectric(wanted.dielectric, offered.dielectric, context),
    polarity(wanted, offered),
    ...voltage(wanted, offered, context),
    ...compareTolerance(wanted, offered, context),
  ];
}

const classOf = (name: Dielectric | null): DielectricClass | null => (name === null ? null : CLASSES[name]);
const isElectrolytic = (name: DielectricClass | null): boolean =>
  name !== null && (name === 'bipolar' || POLARISED.includes(name));

function dielectric(a: Dielectric | null, b: Dielectric | null, { use }: StandInContext): Check {
  const words = [a ?? 'not said', b ?? 'not said'] as const;
  const [from, to] = [classOf(a), classOf(b)];
  const exacting = use === 'timing' || use === 'audio' || use === 'control';
  if (to === 'class-3' && (use === 'timing' || use === 'control'))
    return fail(
      'dielectric',
      ...words,
      `${b ?? ''} loses up to four fifths of its value with heat and voltage: no timing stays put on it.`,
    );
  if (a === b && a !== null) return pass('dielectric', ...words, 'Same dielectric.');
  if (to === null)
    return exacting || (use === null && a !== null)
      ? unknown('dielectric', ...words, 'What is it made of? For timing and audio it must be C0G or film.')
      : remark('dielectric', ...words, 'Its dielectric is not said; for decoupling that does not matter much.');
  if (isElectrolytic(from) || (from === null && isElectrolytic(to))) return betweenElectrolytics(from, to, words);
  if (to === 'stable') return stableOffered(a, b, use, words);
  if (to === 'class-2' || to === 'ceramic') return classTwoOffered(from, to, use, words);
  if (to === 'class-3') {
    if (use === 'audio')
      return fail('dielectric', ...words, `${b ?? ''} distorts and crackles: no signal goes through it.`);
    if (use === 'decoupling' || use === 'power')
      return effect(
        'dielectric',
        ...words,
        'It keeps a fraction of its value when warm and under voltage: take a larger one.',
      );
    return from === 'class-3'
      ? remark('dielectric', ...words, 'As unsteady as the one wanted.')
      : unknown('dielectric', ...words, 'Where does it sit? It is good for decoupling only.');
  }
  return use === 'decoupling' || use === 'power'
    ? effect(
        'dielectric',
        ...words,
        'An electrolytic is slower than a ceramic at high frequencies: as bulk beside one it serves, alone it does not.',
      )
    : fail(
        'dielectric',
        ...words,
        'An electrolytic leaks and its value is rough: it does not replace a film or ceramic capacitor.',
      );
}

function stableOffered(
  a: Dielectric | null,
  b: Dielectric | null,
  use: StandInContext['use'],
  words: readonly [string, string],
): Check {
  if (
    use === 'timing' &&
    (a === 'C0G' || a === 'polypropylene' || a === 'polystyrene' || a === 'mica') &&
    (b === 'polyester' || b === 'film')
  ) {
    return effect(
      'dielectric',
      ...words,
      'Polyester drifts more with temperature than C0G, polystyrene or polypropylene: an oscillator detunes as it warms.',
    );
  }
  return pass(
    'dielectric',
    ...words,
    a === null ? 'C0G and film are good for any use.' : 'As steady as the one wanted.',
  );
}

function classTwoOffered(
  from: DielectricClass | null,
  to: DielectricClass,
  use: StandInContext['use'],
  words: readonly [string, string],
): Check {
  if (to === 'ceramic' && from !== 'ceramic' && (use === 'timing' || use === 'audio' || use === 'control')) {
    return unknown('dielectric', ...words, 'Which ceramic is it? C0G is steady, X7R and worse are not.');
  }
  if (use === 'decoupling' || use === 'power' || use === 'logic')
    return remark('dielectric', ...words, 'For decoupling it serves; under voltage it keeps only part of its value.');
  if (from === 'stable') {
    if (use === 'timing' || use === 'control')
      return fail(
        'dielectric',
        ...words,
        'X7R and its like move by 15 % with temperature and more with voltage: the frequency wanders.',
      );
    if (use === 'audio')
      return effect(
        'dielectric',
        ...words,
        'In the signal path it distorts and picks up knocks; C0G or film does not.',
      );
    return unknown('dielectric', ...words, 'Is it in timing or audio? Then it must be C0G or film.');
  }
  if (from === null && (use === 'timing' || use === 'audio' || use === 'control'))
    return effect('dielectric', ...words, 'It moves with temperature and voltage; C0G or film would be better here.');
  return from === null && use === null
    ? unknown('dielectric', ...words, 'Where does it sit? It is good for decoupling, not for timing or audio.')
    : remark('dielectric', ...words, 'As steady as the one wanted.');
}

function betweenElectrolytics(
  from: DielectricClass | null,
  to: DielectricClass,
  words: readonly [string, string],
): Check {
  if (!isElectrolytic(to))
    return to === 'class-3'
      ? effect('dielectric', ...words, 'It keeps a fraction of its value under voltage.')
      : remark('dielectric', ...words, 'Not an electrolytic: better in every way, if it fits.');
  if (from === null)
    return remark(
      'dielectric',
      ...words,
      'Nothing was said of the kind; values of this size are usually electrolytic.',
    );
  if (to === 'tantalum')
    return effect(
      'dielectric',
      ...words,
      'Tantalum fails short and with fire when overdriven: half its rating, and the right way round.',
    );
  return from === to
    ? pass('dielectric', ...words, 'Same kind.')
    : effect('dielectric', ...words, 'Another kind of electrolytic: its series resistance differs.');
}

function polarity(wanted: PartSpec, offered: PartSpec): Check {
  const [from, to] = [classOf(wanted.dielectric), classOf(offered.dielectric)];
  const say = (kind: DielectricClass | null): string =>
    kind === null ? 'not said' : POLARISED.includes(kind) ? 'polarised' : 'not polarised';
  const words = [say(from), say(to)] as const;
  if (to === null) return pass('polarised', ...words, 'Nothing says that it is polarised.');
  if (!POLARISED.includes(to)) return pass('polarised', ...words, 'It may go in either way round.');
  if (from !== null)
    return POLARISED.includes(from)
      ? pass('polarised', ...words, 'Both are polarised.')
      : fail('polarised', ...words, 'A polarised capacitor in a place that swings both ways breaks down.');
  const farads = wanted.value === null ? 0 : toNumber(wanted.value);
  return farads >= 1e-6
    ? unknown('polarised', ...words, 'May the place take a polarised one? See whether its voltage ever turns round.')
    : fail('polarised', ...words, 'Values below 1 µF are meant as film or ceramic; a polarised one does not go there.');
}

function voltage(wanted: PartSpec, offered: PartSpec, { rails, use }: StandInContext): Check[] {
  const stress = use === 'decoupling' || use === 'power' || use === 'logic' ? highestRail(rails) : spanOf(rails);
  const kind = classOf(offered.dielectric);
  const [a, b] = [wanted.ratedVolts, offered.ratedVolts];
  const words = [
    a === null ? (stress === null ? 'not said' : `${measure(stress, 'V')} rail`) : measure(a, 'V'),
    b === null ? 'not said' : measure(b, 'V'),
  ] as const;
  if (b === null) {
    if (a === null && (stress === null || stress <= 30) && !isElectrolytic(kind)) return [];
    return [unknown('voltage', ...words, 'Its voltage rating is not said: read it on the body.')];
  }
  if (stress !== null && b < stress)
    return [fail('voltage', ...words, `The rail gives it ${measure(stress, 'V')}; it bears ${measure(b, 'V')}.`)];
  const derating = kind === null ? 0.75 : DERATING[kind];
  if (stress !== null && stress > b * derating) {
    if (kind === 'tantalum')
      return [
        fail(
          'voltage',
          ...words,
          `Solid tantalum is used at half its rating: ${measure(stress, 'V')} wants ${measure(stress / derating, 'V')}.`,
        ),
      ];
    return [
      effect(
        'voltage',
        ...words,
        `Little margin: by common practice such a capacitor sees at most ${Math.round(derating * 100)} % of its rating.`,
      ),
    ];
  }
  if (a === null || b >= a) return [pass('voltage', ...words, 'It bears as much.')];
  return [
    stress === null
      ? unknown('voltage', ...words, 'It bears less than the wanted part: which rails are there?')
      : remark(
          'voltage',
          ...words,
          `It bears less than the wanted part, with margin enough for ${measure(stress, 'V')}.`,
        ),
  ];
}
