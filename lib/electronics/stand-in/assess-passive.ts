/** Stand-in checks for resistors, potentiometers, trimmers, inductors and crystals. */
import type { PartSpec, Taper } from '../part-spec';
import { compareTolerance, compareValue } from './assess-value';
import { type Check, effect, fail, measure, pass, remark, type StandInContext, unknown } from './check';

export function assessResistor(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  return [
    compareValue(wanted, offered, context),
    ...compareTolerance(wanted, offered, context),
    ...power(wanted, offered),
    ...technology(wanted, offered, context),
  ];
}

function power(wanted: PartSpec, offered: PartSpec): Check[] {
  const [a, b] = [wanted.ratedWatts, offered.ratedWatts];
  if (a === null) return [];
  const words = [measure(a, 'W'), b === null ? 'not said' : measure(b, 'W')] as const;
  if (b === null)
    return [
      a <= 0.25
        ? remark('power', ...words, 'Its power is not said; leaded ones bear 0.25 W as a rule.')
        : unknown('power', ...words, 'Its power is not said.'),
    ];
  return [
    b >= a
      ? pass('power', ...words, 'It bears as much.')
      : fail('power', ...words, 'It bears less power than was asked for: it burns.'),
  ];
}

function technology(wanted: PartSpec, offered: PartSpec, { use }: StandInContext): Check[] {
  const [a, b] = [wanted.technology, offered.technology];
  if (b === null || a === b) return [];
  const words = [a ?? 'not said', b] as const;
  if (b === 'wirewound')
    return [
      use === 'power' || use === null
        ? remark('technology', ...words, 'Wirewound has inductance; on a rail that does not matter.')
        : effect('technology', ...words, 'Wirewound has inductance.'),
    ];
  const fine = a === 'metal-film' || a === 'thin-film';
  if (fine && (b === 'carbon-film' || b === 'carbon-composition' || b === 'thick-film')) {
    return [
      use === 'audio' || use === 'timing' || use === 'control' || use === null
        ? effect('technology', ...words, 'It drifts and hisses more than metal film.')
        : remark('technology', ...words, 'It drifts more than metal film, which does not matter here.'),
    ];
  }
  return [pass('technology', ...words, 'As good for the place.')];
}

const WORD_TAPERS: readonly Taper[] = ['linear', 'log', 'reverse-log'];

function taper(wanted: Taper | null, offered: Taper | null): Check {
  const words = [wanted ?? 'not said', offered ?? 'not said'] as const;
  if (wanted === null) return remark('taper', ...words, 'No taper was asked for.');
  if (offered === null)
    return unknown(
      'taper',
      ...words,
      'Which taper has it? At half rotation a linear one reads 50 %, a log one about 15 %.',
    );
  if (wanted === offered) return pass('taper', ...words, 'Same taper.');
  const reverse = (name: Taper): boolean => name === 'reverse-log' || name === 'letter-C';
  if (reverse(wanted) && reverse(offered)) return pass('taper', ...words, 'C is reverse log everywhere.');
  if (reverse(wanted) || reverse(offered)) return fail('taper', ...words, 'Its travel runs the other way.');
  if (WORD_TAPERS.includes(wanted) && WORD_TAPERS.includes(offered)) {
    return fail(
      'taper',
      ...words,
      wanted === 'linear'
        ? 'A log pot reads 15 % at half travel: the control bunches at one end.'
        : 'A linear pot does all its work in the first quarter turn here.',
    );
  }
  // Under either convention one of the letters A and B is linear and the other log.
  if (wanted.startsWith('letter') && offered.startsWith('letter'))
    return fail('taper', ...words, 'A and B are different tapers under every convention.');
  return unknown(
    'taper',
    ...words,
    'The letter means log or linear by convention (A is log and B linear on most made today, the other way round on old European ones): measure at half rotation.',
  );
}

function gangs(text: string): number {
  if (/\b(?:quad|4[- ]?gang)/i.test(text)) return 4;
  return /\b(?:dual|stereo|tandem|2[- ]?gang|double)/i.test(text) ? 2 : 1;
}

export function assessPotentiometer(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  const [a, b] = [gangs(wanted.text), gangs(offered.text)];
  const gangWords = [`${a} gang`, `${b} gang`] as const;
  return [
    compareValue(wanted, offered, context),
    ...(wanted.kind === 'potentiometer' ? [taper(wanted.taper, offered.taper)] : []),
    a === b
      ? pass('gang', ...gangWords, 'Same number of gangs.')
      : b > a
        ? effect('gang', ...gangWords, 'It has a gang too many: leave it free, if the panel has room.')
        : fail('gang', ...gangWords, 'It has too few gangs.'),
    ...compareTolerance(wanted, offered, context),
  ];
}

export function assessInductor(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  const [a, b] = [wanted.ratedAmperes, offered.ratedAmperes];
  const words = [a === null ? 'not said' : measure(a, 'A'), b === null ? 'not said' : measure(b, 'A')] as const;
  const current =
    a === null
      ? remark('current', ...words, 'See that it bears the current without saturating.')
      : b === null
        ? unknown('current', ...words, 'Its current is not said.')
        : b >= a
          ? pass('current', ...words, 'It carries as much.')
          : fail('current', ...words, 'It saturates earlier than was asked for.');
  return [compareValue(wanted, offered, context), current, ...compareTolerance(wanted, offered, context)];
}

export function assessCrystal(wanted: PartSpec, offered: PartSpec, context: StandInContext): Check[] {
  return [
    compareValue(wanted, offered, { ...context, lineTolerancePercent: 0 }),
    unknown(
      'load',
      'not said',
      'not said',
      'Is it cut for the same load capacitance? Its frequency and start depend on that.',
    ),
  ];
}
