/** 74-series logic: one row per function, one family per technology that makes it. */
import { datasheet, gatePins, pinOut, practice, recalled, supplyOf } from './fact';
import type { Fact, LogicFamily, LogicSeries, PinOut, SchmittThreshold, Supply } from './family';
import { LOGIC_74 } from './spellings';

const TWO_DATASETS = 'two independent symbol datasets agree (KiCad 6, Lepton EDA), unit by unit';
const ONE_DATASET = 'KiCad 6 symbol, read; no second source';

export const SUPPLY_74: Readonly<Record<LogicSeries, Supply>> = {
  '4000': supplyOf('- - -', ''),
  hc: supplyOf('2d 6d 7d', 'NXP 74HC1G14: 2-6 V, 7 V absolute'),
  hcu: supplyOf('2d 6d 7d', 'NXP 74HC1G14: 2-6 V, 7 V absolute'),
  hct: supplyOf('4.5d 5.5d 7d', 'NXP 74HCT1G14: 4.5-5.5 V, 7 V absolute'),
  ls: supplyOf('4.75p 5.25p 7p', 'TTL runs on 5 V within 5 %'),
  ttl: supplyOf('4.75p 5.25p 7p', 'TTL runs on 5 V within 5 %'),
};

const PREFIX: Readonly<Record<string, LogicSeries>> = { ttl: 'ttl', ls: 'ls', hc: 'hc', hct: 'hct', hcu: 'hcu' };
const NAMES: Readonly<Record<LogicSeries, string>> = {
  '4000': '4000',
  ttl: '74 TTL',
  ls: '74LS',
  hc: '74HC',
  hct: '74HCT, TTL input levels',
  hcu: '74HCU, unbuffered',
};

const QUAD = '1,2>3 4,5>6 9,10>8 12,13>11';
const HEX = '1>2 3>4 5>6 9>8 11>10 13>12';
const VCC14 = ['VCC', 14] as const;
const GND7 = ['GND', 7] as const;

interface Row {
  readonly title: string;
  readonly units: number;
  readonly unitFunction: string;
  readonly pins: Fact<PinOut> | null;
  readonly schmitt?: boolean;
  readonly openDrain?: boolean;
}

function gates(
  title: string,
  unitFunction: string,
  layout: string,
  more: { readonly schmitt?: boolean; readonly openDrain?: boolean } = {},
): Row {
  return {
    title,
    units: layout.split(' ').length,
    unitFunction,
    pins: practice(gatePins(14, layout, VCC14, GND7), TWO_DATASETS),
    ...more,
  };
}

function block(title: string, units: number, unitFunction: string, names: string, source = ONE_DATASET): Row {
  return { title, units, unitFunction, pins: practice(pinOut(names, `DIP-${names.split(' ').length}`), source) };
}

const ROWS: Readonly<Record<string, Row>> = {
  '00': gates('quad NAND', 'NAND2', QUAD),
  '02': gates('quad NOR', 'NOR2', '2,3>1 5,6>4 8,9>10 11,12>13'),
  '04': gates('hex inverter', 'NOT', HEX),
  '08': gates('quad AND', 'AND2', QUAD),
  '10': gates('triple NAND, 3 inputs', 'NAND3', '1,2,13>12 3,4,5>6 9,10,11>8'),
  '14': gates('hex inverter, Schmitt', 'NOT', HEX, { schmitt: true }),
  '20': gates('dual NAND, 4 inputs', 'NAND4', '1,2,4,5>6 9,10,12,13>8'),
  '32': gates('quad OR', 'OR2', QUAD),
  '86': gates('quad XOR', 'XOR2', QUAD),
  '132': gates('quad NAND, Schmitt', 'NAND2', QUAD, { schmitt: true }),
  '266': gates('quad XNOR, open drain', 'XNOR2', '1,2>3 5,6>4 8,9>10 12,13>11', { openDrain: true }),
  '74': block(
    'dual D flip-flop, set and reset active low',
    2,
    'D flip-flop, active-low set and reset',
    '/R1 D1 CLK1 /S1 Q1 /Q1 GND /Q2 Q2 /S2 CLK2 D2 /R2 VCC',
    TWO_DATASETS,
  ),
  '123': block(
    'dual monostable',
    2,
    'monostable 74123',
    '/A1 B1 /R1 /Q1 Q2 CX2 RXCX2 GND /A2 B2 /R2 /Q2 Q1 CX1 RXCX1 VCC',
  ),
  '138': block('3 to 8 decoder', 1, '3 to 8 decoder', 'A B C /E1 /E2 E3 /Y7 GND /Y6 /Y5 /Y4 /Y3 /Y2 /Y1 /Y0 VCC'),
  '164': block(
    '8-bit shift register',
    1,
    '8-bit shift register, serial in',
    'A B Q0 Q1 Q2 Q3 GND CLK /R Q4 Q5 Q6 Q7 VCC',
  ),
  '165': block(
    '8-bit shift register, parallel in',
    1,
    '8-bit shift register 74165',
    '/PL CLK D4 D5 D6 D7 /Q7 GND Q7 DS D0 D1 D2 D3 /CE VCC',
  ),
  '595': block(
    '8-bit shift register with latch',
    1,
    '8-bit shift register 74595',
    'QB QC QD QE QF QG QH GND QHS /SRCLR SRCLK RCLK /OE SER QA VCC',
  ),
  '4017': block(
    'decade counter, ten decoded outputs',
    1,
    'decade counter, decoded',
    'Q5 Q1 Q0 Q2 Q6 Q7 Q3 GND Q8 Q4 Q9 CO INH CLK R VCC',
    'keeps the 4000-series pins',
  ),
  '4020': block(
    '14-stage ripple counter',
    1,
    '14-stage ripple counter',
    'Q12 Q13 Q14 Q6 Q5 Q7 Q4 GND Q1 /CLK R Q9 Q8 Q10 Q11 VCC',
    'keeps the 4000-series pins',
  ),
  '4024': block('7-stage ripple counter', 1, '7-stage ripple counter', '/CLK R Q7 Q6 Q5 Q4 GND NC Q3 NC Q2 Q1 NC VCC'),
  '4040': block(
    '12-stage ripple counter',
    1,
    '12-stage ripple counter',
    'Q12 Q6 Q5 Q7 Q4 Q3 Q2 GND Q1 /CLK R Q9 Q8 Q10 Q11 VCC',
    'keeps the 4000-series pins',
  ),
  '4046': block(
    'phase-locked loop with VCO',
    1,
    'phase-locked loop, HC law',
    'PCP PC1 COMPIN VCOOUT INH C1A C1B GND VCOIN SF R1 R2 PC2 SIGIN PC3 VCC',
    'keeps the 4000-series pins',
  ),
  '4049': {
    title: 'hex inverting buffer',
    units: 6,
    unitFunction: 'NOT',
    pins: practice(gatePins(16, '3>2 5>4 7>6 9>10 11>12 14>15', ['VCC', 1], ['GND', 8]), 'keeps the 4000-series pins'),
  },
  '4050': {
    title: 'hex buffer',
    units: 6,
    unitFunction: 'BUF',
    pins: practice(gatePins(16, '3>2 5>4 7>6 9>10 11>12 14>15', ['VCC', 1], ['GND', 8]), 'keeps the 4000-series pins'),
  },
  '4060': block(
    '14-stage counter with oscillator',
    1,
    '14-stage counter with oscillator',
    'Q12 Q13 Q14 Q6 Q5 Q7 Q4 GND CTC RTC RS R Q9 Q8 Q10 VCC',
    'keeps the 4000-series pins',
  ),
  '4075': gates('triple OR, 3 inputs', 'OR3', '1,2,8>9 3,4,5>6 11,12,13>10'),
  '4520': block(
    'dual binary counter',
    2,
    'binary up counter',
    'CLK1 EN1 Q1_1 Q2_1 Q3_1 Q4_1 R1 GND CLK2 EN2 Q1_2 Q2_2 Q3_2 Q4_2 R2 VCC',
    'keeps the 4000-series pins',
  ),
  '4538': block(
    'dual precision monostable',
    2,
    'monostable R·C',
    'CX1 RXCX1 /R1 +T1 -T1 Q1 /Q1 GND /Q2 Q2 -T2 +T2 /R2 RXCX2 CX2 VCC',
    'keeps the 4000-series pins',
  ),
};

const NXP_HC14 = 'NXP 74HC1G14, typical';
const THRESHOLDS_HC14: readonly SchmittThreshold[] = [
  { maker: 'NXP', supplyVolts: 4.5, upVolts: 2.36, downVolts: 1.53, basis: 'datasheet', source: NXP_HC14 },
  { maker: 'NXP', supplyVolts: 6, upVolts: 3.12, downVolts: 2.08, basis: 'datasheet', source: NXP_HC14 },
];

export const LOGIC_74_FAMILIES: readonly LogicFamily[] = Object.entries(ROWS).flatMap(([number, row]) =>
  (LOGIC_74[number] ?? []).map((technology): LogicFamily => {
    const series = PREFIX[technology] ?? 'ttl';
    return {
      id: `74${series === 'ttl' ? '' : series}${number}`,
      kind: 'ic',
      group: 'logic',
      series,
      title: `${row.title} (${NAMES[series]})`,
      units: row.units,
      unitFunction: row.unitFunction,
      pinOut: row.pins,
      schmittInputs: practice(row.schmitt ?? false, 'the function of the number, in every maker’s datasheet'),
      openDrain:
        row.openDrain === true
          ? recalled(true, 'LS open collector; HC open drain from most makers, one recalled as push-pull')
          : practice(false, 'push-pull output'),
      unbuffered: series === 'hcu',
      supply: SUPPLY_74[series],
      thresholds: number === '14' && series === 'hc' ? THRESHOLDS_HC14 : [],
      cautions:
        series === 'hct'
          ? [
              datasheet(
                'Inputs switch at TTL levels, about 1.4 V: a CMOS threshold at half the supply is lost.',
                'the HCT input specification',
              ),
            ]
          : [],
    };
  }),
);
