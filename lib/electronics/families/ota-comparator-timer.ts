/** Transconductance amplifiers, comparators, timers and the small amplifiers that are no op-amps. */
import { pinOut, practice, recalled, supplyOf } from './fact';
import type { ExactIcFamily, Fact, PinOut, Supply } from './family';

const K = 'KiCad 6 symbol, read';
const LM13700 = pinOut(
  'IABC1 DIODE1 IN1+ IN1- OUT1 V- BUFIN1 BUFOUT1 BUFOUT2 BUFIN2 V+ OUT2 IN2- IN2+ DIODE2 IABC2',
  'DIP-16',
);
const CA3080 = pinOut('NC IN- IN+ V- IABC OUT V+ NC', 'DIP-8');
const LM311 = pinOut('GND IN+ IN- V- BAL BAL/STROBE OUT V+', 'DIP-8');
const LM339 = pinOut('OUT2 OUT1 V+ IN1- IN1+ IN2- IN2+ IN3- IN3+ IN4- IN4+ GND OUT4 OUT3', 'DIP-14');
const LM393 = pinOut('OUT1 IN1- IN1+ GND IN2+ IN2- OUT2 V+', 'DIP-8');
const P555 = pinOut('GND TRIG OUT RESET CV THR DISCH VCC', 'DIP-8');
const P556 = pinOut('DISCH1 THR1 CV1 RESET1 OUT1 TRIG1 GND TRIG2 OUT2 RESET2 CV2 THR2 DISCH2 VCC', 'DIP-14');

type Output = NonNullable<ExactIcFamily['output']>['value'];

interface More {
  readonly near?: Readonly<Record<string, Fact<string>>>;
  readonly cautions?: readonly Fact<string>[];
}

function exact(
  group: ExactIcFamily['group'],
  id: string,
  title: string,
  units: number,
  unitFunction: string,
  pins: PinOut | null,
  supply: Supply,
  output: Output | null,
  more: More = {},
): ExactIcFamily {
  return {
    id,
    kind: 'ic',
    group,
    title,
    units,
    unitFunction,
    pinOut: pins === null ? null : practice(pins, K),
    supply,
    output: output === null ? null : practice(output, 'the type’s output stage, on its datasheet’s first page'),
    near: more.near ?? {},
    cautions: more.cautions ?? [],
  };
}

const BUFFER_NOTE = practice(
  'The buffers differ: those of the LM13600 take their bias from the control current, which moves the offset when the buffers are used.',
  'National LM13600 and LM13700 sheets',
);
const CMOS_FOR_BIPOLAR = practice(
  'A CMOS 555 sources far less current (0.8 to 10 mA against 200 mA) and spares the rail the switching spike; timing constants differ by a few percent.',
  'Intersil, Philips and TI sheets',
);
const BIPOLAR_FOR_CMOS = practice(
  'A bipolar 555 needs 4.5 V and its inputs draw current: long times with big resistors come out wrong, and it spikes the rail.',
  'NE555 sheets',
);
const CMOS_FOR_CMOS = practice(
  'Makers’ CMOS 555s differ a little in threshold and output current.',
  'Intersil, Philips and TI sheets',
);

export const OTA_COMPARATOR_TIMER_FAMILIES: readonly ExactIcFamily[] = [
  exact(
    'ota',
    'lm13700',
    'dual OTA with buffers',
    2,
    'OTA with linearising diodes and buffer',
    LM13700,
    supplyOf('9.5m 36d 36d', 'National LM13700'),
    'current',
    { near: { lm13600: BUFFER_NOTE } },
  ),
  exact(
    'ota',
    'lm13600',
    'dual OTA with buffers',
    2,
    'OTA with linearising diodes and buffer',
    LM13700,
    supplyOf('9.5m 36d 36d', 'National LM13600'),
    'current',
    { near: { lm13700: BUFFER_NOTE } },
  ),
  exact('ota', 'ca3080', 'single OTA', 1, 'OTA', CA3080, supplyOf('4d 30d 36m', 'Harris CA3080, 1996'), 'current', {
    cautions: [practice('Transconductance spreads 2:1 between pieces.', 'Harris CA3080, 1996')],
  }),
  exact('ota', 'ca3280', 'dual OTA', 2, 'OTA with linearising diodes', null, supplyOf('4m 30m 36m', ''), 'current'),
  exact('ota', 'as13704', 'quad OTA', 4, 'OTA with buffer', null, supplyOf('- - -', ''), 'current'),
  exact(
    'ota',
    'lm3900',
    'quad current-differencing amplifier',
    4,
    'current-differencing amplifier',
    null,
    supplyOf('4m 32m 36m', ''),
    null,
  ),
  exact(
    'comparator',
    'lm311',
    'single comparator',
    1,
    'comparator',
    LM311,
    supplyOf('3.5d 30d 36m', 'LM311 sheets'),
    'open-collector',
  ),
  exact(
    'comparator',
    'lm319',
    'dual comparator',
    2,
    'comparator',
    pinOut('NC NC GND1 IN1+ IN1- V- OUT2 GND2 IN2+ IN2- V+ OUT1 NC NC', 'DIP-14'),
    supplyOf('5m 36m 36m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'lm339',
    'quad comparator',
    4,
    'comparator',
    LM339,
    supplyOf('2d 36d 36d', 'onsemi and TI LM339'),
    'open-collector',
    {
      near: { lm2901: practice('The same circuit in a wider temperature grade.', 'TI LM339 sheet, which holds both') },
    },
  ),
  exact(
    'comparator',
    'lm2901',
    'quad comparator',
    4,
    'comparator',
    LM339,
    supplyOf('2d 36d 36d', 'onsemi and TI LM339'),
    'open-collector',
    {
      near: {
        lm339: practice('The same circuit in a narrower temperature grade.', 'TI LM339 sheet, which holds both'),
      },
    },
  ),
  exact(
    'comparator',
    'lm393',
    'dual comparator',
    2,
    'comparator',
    LM393,
    supplyOf('2d 36d 36d', 'ST LM393'),
    'open-collector',
    { near: { lm2903: practice('The same circuit in a wider temperature grade.', 'LM393 sheets hold both') } },
  ),
  exact(
    'comparator',
    'lm2903',
    'dual comparator',
    2,
    'comparator',
    LM393,
    supplyOf('2d 36d 36d', 'ST LM393'),
    'open-collector',
    { near: { lm393: practice('The same circuit in a narrower temperature grade.', 'LM393 sheets hold both') } },
  ),
  exact(
    'comparator',
    'tl331',
    'single comparator, SOT-23',
    1,
    'comparator',
    pinOut('IN- GND IN+ OUT V+', 'SOT-23-5'),
    supplyOf('2m 36m 36m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'lmv331',
    'single comparator, SOT-23',
    1,
    'comparator',
    pinOut('IN+ GND IN- OUT V+', 'SOT-23-5'),
    supplyOf('2.7m 5.5m 5.5m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'lmv393',
    'dual comparator, low voltage',
    2,
    'comparator',
    LM393,
    supplyOf('2.7m 5.5m 5.5m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'lmv339',
    'quad comparator, low voltage',
    4,
    'comparator',
    LM339,
    supplyOf('2.7m 5.5m 5.5m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'tlc372',
    'dual comparator, CMOS',
    2,
    'comparator',
    LM393,
    supplyOf('2m 16m 18m', ''),
    'open-collector',
  ),
  exact(
    'comparator',
    'tlc374',
    'quad comparator, CMOS',
    4,
    'comparator',
    LM339,
    supplyOf('2m 16m 18m', ''),
    'open-collector',
  ),
  exact(
    'timer',
    'ne555',
    'timer, bipolar',
    1,
    '555 timer',
    P555,
    supplyOf('4.5d 16d 18m', 'NE555 sheets'),
    'push-pull',
    { near: { icm7555: CMOS_FOR_BIPOLAR, tlc555: CMOS_FOR_BIPOLAR, lmc555: CMOS_FOR_BIPOLAR } },
  ),
  exact(
    'timer',
    'icm7555',
    'timer, CMOS',
    1,
    '555 timer',
    P555,
    supplyOf('2d 18d 18m', 'Intersil ICM7555; Philips 3-16 V'),
    'light-drive',
    { near: { ne555: BIPOLAR_FOR_CMOS, tlc555: CMOS_FOR_CMOS, lmc555: CMOS_FOR_CMOS } },
  ),
  exact('timer', 'tlc555', 'timer, CMOS', 1, '555 timer', P555, supplyOf('2d 15d 18m', 'TI TLC555'), 'light-drive', {
    near: { ne555: BIPOLAR_FOR_CMOS, icm7555: CMOS_FOR_CMOS, lmc555: CMOS_FOR_CMOS },
  }),
  exact('timer', 'lmc555', 'timer, CMOS', 1, '555 timer', P555, supplyOf('1.5m 12m 15m', ''), 'light-drive', {
    near: { ne555: BIPOLAR_FOR_CMOS, icm7555: CMOS_FOR_CMOS, tlc555: CMOS_FOR_CMOS },
  }),
  exact(
    'timer',
    'ne556',
    'dual timer, bipolar',
    2,
    '555 timer',
    P556,
    supplyOf('4.5p 16p 18m', 'two NE555 in one package'),
    'push-pull',
    { near: { icm7556: CMOS_FOR_BIPOLAR, tlc556: CMOS_FOR_BIPOLAR } },
  ),
  exact('timer', 'icm7556', 'dual timer, CMOS', 2, '555 timer', P556, supplyOf('2m 18m 18m', ''), 'light-drive', {
    near: { ne556: BIPOLAR_FOR_CMOS, tlc556: CMOS_FOR_CMOS },
  }),
  exact('timer', 'tlc556', 'dual timer, CMOS', 2, '555 timer', P556, supplyOf('2m 15m 18m', ''), 'light-drive', {
    near: { ne556: BIPOLAR_FOR_CMOS, icm7556: CMOS_FOR_CMOS },
  }),
  exact(
    'timer',
    'ne567',
    'tone decoder',
    1,
    'tone decoder',
    pinOut('OUTCAP LOOPCAP IN VCC TIMR TIMRC GND OUT', 'DIP-8'),
    supplyOf('4.75m 9m 10m', ''),
    'open-collector',
  ),
  exact(
    'sound',
    'lm386',
    'small power amplifier',
    1,
    'power amplifier',
    pinOut('GAIN IN- IN+ GND OUT V+ BYPASS GAIN', 'DIP-8'),
    supplyOf('4m 12m 15m', ''),
    null,
    { cautions: [recalled('The N-4 grade takes 18 V, the others 12 V.')] },
  ),
];
