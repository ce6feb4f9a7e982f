/** Linear regulators with the lead order of their usual case, and voltage references written with their voltage. */
import { noted, pinOut, practice, recalled, supplyOf } from './fact';
import type { ExactIcFamily, Fact, PinOut, RegulatorFamily } from './family';
import { LADDER_78, LDO_VOLTS } from './spellings';

const K = 'KiCad 6 symbol, read, and datasheets recalled';

interface Ladder {
  readonly polarity: 'positive' | 'negative';
  readonly word: string;
  readonly pins: Fact<PinOut>;
  readonly tab: string | null;
  readonly limits: string;
  readonly cautions?: readonly Fact<string>[];
}

const TO220_78 = practice(pinOut('IN GND OUT', 'TO-220'), K);
const TO220_79 = practice(pinOut('GND IN OUT', 'TO-220'), K);
const TO92_78L = practice(pinOut('OUT GND IN', 'TO-92'), K);
const TO92_79L = practice(pinOut('GND IN OUT', 'TO-92'), K);
const TAB_NOT_GROUND = practice('Its tab is the input, not ground: insulate it from the heat sink.', K);

// limits: input maximum V, output A, dropout V
const LADDERS: Readonly<Record<string, Ladder>> = {
  '78': { polarity: 'positive', word: '1 A', pins: TO220_78, tab: 'GND', limits: '35p 1p 2p' },
  '79': {
    polarity: 'negative',
    word: '1 A',
    pins: TO220_79,
    tab: 'IN',
    limits: '35p 1p 2p',
    cautions: [TAB_NOT_GROUND],
  },
  '78m': { polarity: 'positive', word: '0.5 A', pins: TO220_78, tab: 'GND', limits: '35p 0.5p 2p' },
  '79m': {
    polarity: 'negative',
    word: '0.5 A',
    pins: TO220_79,
    tab: 'IN',
    limits: '35p 0.5p 2p',
    cautions: [TAB_NOT_GROUND],
  },
  '78l': { polarity: 'positive', word: '0.1 A', pins: TO92_78L, tab: null, limits: '30p 0.1p 1.7p' },
  '79l': { polarity: 'negative', word: '0.1 A', pins: TO92_79L, tab: null, limits: '30p 0.1p 1.7p' },
};

function regulator(
  id: string,
  title: string,
  polarity: RegulatorFamily['polarity'],
  outputVolts: number | null,
  pins: Fact<PinOut> | null,
  limits: string,
  tab: string | null = null,
  cautions: readonly Fact<string>[] = [],
): RegulatorFamily {
  const [input = '-', current = '-', dropout = '-'] = limits.split(' ');
  return {
    id,
    kind: 'regulator',
    group: 'regulator',
    title,
    units: 1,
    pinOut: pins,
    polarity,
    outputVolts,
    inputMaximumVolts: noted(input, K),
    outputAmperes: noted(current, K),
    dropoutVolts: noted(dropout, K),
    tab,
    cautions,
  };
}

const fixed = Object.entries(LADDER_78).flatMap(([series, voltages]) => {
  const ladder = LADDERS[series];
  if (ladder === undefined) return [];
  return voltages.map((volts) => {
    const sign = ladder.polarity === 'negative' ? '−' : '+';
    const limits = volts === '24' ? ladder.limits.replace(/^\d+p/, '40p') : ladder.limits;
    return regulator(
      `${series}${volts}`,
      `regulator ${sign}${Number(volts)} V, ${ladder.word}`,
      ladder.polarity,
      Number(volts),
      ladder.pins,
      limits,
      ladder.tab,
      ladder.cautions,
    );
  });
});

const OUTPUT_CAPACITOR = practice(
  'A low-dropout regulator wants the output capacitor of its datasheet, or it oscillates.',
  'LM1117 and LM2940 datasheets',
);
const TO92_LP2950 = practice(pinOut('OUT GND IN', 'TO-92'), K);

const LDO_FORMS: Readonly<
  Record<
    string,
    {
      readonly pins: Fact<PinOut> | null;
      readonly adjustPins: Fact<PinOut> | null;
      readonly limits: string;
      readonly tab: string | null;
    }
  >
> = {
  lm1117: {
    pins: practice(pinOut('GND OUT IN', 'SOT-223'), K),
    adjustPins: practice(pinOut('ADJ OUT IN', 'SOT-223'), K),
    limits: '15p 0.8p 1.1p',
    tab: 'OUT',
  },
  lm2940: { pins: recalled(pinOut('IN GND OUT', 'TO-220')), adjustPins: null, limits: '26m 1m 0.5m', tab: 'GND' },
  lm2931: { pins: practice(pinOut('OUT GND IN', 'TO-92'), K), adjustPins: null, limits: '26m 0.1m 0.3m', tab: null },
  lp2950: { pins: TO92_LP2950, adjustPins: null, limits: '30m 0.1m 0.4m', tab: null },
  lp2951: { pins: null, adjustPins: null, limits: '30m 0.1m 0.4m', tab: null },
  mcp1700: { pins: practice(pinOut('GND IN OUT', 'TO-92'), K), adjustPins: null, limits: '6m 0.25m 0.2m', tab: null },
};

const lowDropout = Object.entries(LDO_FORMS).flatMap(([series, form]) =>
  (LDO_VOLTS[series] ?? []).map((volts) =>
    volts === 'adj'
      ? regulator(
          `${series}-adj`,
          'low-dropout regulator, adjustable',
          'positive',
          null,
          form.adjustPins,
          form.limits,
          form.tab,
          [OUTPUT_CAPACITOR],
        )
      : regulator(
          `${series}-${volts}`,
          `low-dropout regulator +${volts} V`,
          'positive',
          Number(volts),
          form.pins,
          form.limits,
          form.tab,
          [OUTPUT_CAPACITOR],
        ),
  ),
);

const MINIMUM_LOAD = practice('Needs a load of 3.5 to 10 mA to hold its voltage.', 'LM317 datasheets');

export const REGULATOR_FAMILIES: readonly RegulatorFamily[] = [
  ...fixed,
  ...lowDropout,
  regulator(
    'lm317',
    'adjustable regulator, positive, 1.5 A',
    'positive',
    null,
    practice(pinOut('ADJ OUT IN', 'TO-220'), K),
    '40p 1.5p 2p',
    'OUT',
    [MINIMUM_LOAD],
  ),
  regulator(
    'lm337',
    'adjustable regulator, negative, 1.5 A',
    'negative',
    null,
    practice(pinOut('ADJ IN OUT', 'TO-220'), K),
    '40p 1.5p 2p',
    'IN',
    [MINIMUM_LOAD, TAB_NOT_GROUND],
  ),
  regulator(
    'lm317l',
    'adjustable regulator, positive, 0.1 A',
    'positive',
    null,
    practice(pinOut('ADJ OUT IN', 'TO-92'), K),
    '40p 0.1p 1.5p',
  ),
  regulator(
    'lm337l',
    'adjustable regulator, negative, 0.1 A',
    'negative',
    null,
    recalled(pinOut('ADJ OUT IN', 'TO-92'), 'KiCad 6 symbol, unconfirmed'),
    '40m 0.1m 1.5m',
  ),
  regulator(
    'lm338',
    'adjustable regulator, positive, 5 A',
    'positive',
    null,
    recalled(pinOut('ADJ OUT IN', 'TO-220')),
    '40m 5m 2.5m',
    'OUT',
  ),
  regulator(
    'lm350',
    'adjustable regulator, positive, 3 A',
    'positive',
    null,
    practice(pinOut('ADJ OUT IN', 'TO-220'), K),
    '35m 3m 2.5m',
    'OUT',
  ),
  regulator('lm723', 'adjustable regulator with outboard pass transistor', 'positive', null, null, '40m 0.15m 3m'),
  regulator('l200', 'adjustable regulator with current limit', 'positive', null, null, '40m 2m 2m'),
  regulator('icl7660', 'charge-pump inverter', 'converter', null, null, '10m 0.02m -'),
  regulator('lt1054', 'charge-pump inverter', 'converter', null, null, '15m 0.1m -'),
];

const SHUNT = (): Fact<PinOut> => practice(pinOut('NC K A', 'TO-92'), K);

export const VOLTAGE_REFERENCE_FAMILIES: readonly ExactIcFamily[] = (['lm4040', 'lm336', 'lm385'] as const).flatMap(
  (series) =>
    (LDO_VOLTS[series] ?? []).map(
      (volts): ExactIcFamily => ({
        id: `${series}-${volts}`,
        kind: 'ic',
        group: 'reference',
        title: volts === 'adj' ? 'shunt reference, adjustable' : `shunt reference ${volts} V`,
        units: 1,
        unitFunction: volts === 'adj' ? `${series} adjustable shunt reference` : `shunt reference ${volts} V`,
        pinOut: series === 'lm336' || volts === 'adj' ? null : SHUNT(),
        supply: supplyOf('- - -', ''),
        output: null,
        near: {},
        cautions: [],
      }),
    ),
);
