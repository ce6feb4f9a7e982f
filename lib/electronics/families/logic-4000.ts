/** 4000-series CMOS: gates, flip-flops, counters and one-shots. Analogue switches of the series stand in switches.ts. */
import { datasheet, gatePins, pinOut, practice, recalled, supplyOf } from './fact';
import type { Fact, LogicFamily, PinOut, SchmittThreshold } from './family';

const TWO_DATASETS = 'two independent symbol datasets agree (KiCad 6, Lepton EDA), unit by unit';
const ONE_DATASET = 'KiCad 6 symbol, read; no second source';
const SUPPLY_SOURCE =
  'CD4000B (TI) and HCF (ST) 3-18 V, 20 V absolute; HEF (Nexperia) and CD40xxBC (Fairchild) 3-15 V, 18 V absolute';
/** Makers differ: some end at 15 V, some at 18 V; the check remarks on what lies between. */
export const SUPPLY_4000 = supplyOf('3d 18d 20d', SUPPLY_SOURCE);

const VDD14 = ['VDD', 14] as const;
const VSS7 = ['VSS', 7] as const;
const QUAD = '1,2>3 5,6>4 8,9>10 12,13>11';
const HEX = '1>2 3>4 5>6 9>8 11>10 13>12';
const HEX16 = '3>2 5>4 7>6 9>10 11>12 14>15';
const TRIPLE = '1,2,8>9 3,4,5>6 11,12,13>10';
const DUAL4 = '2,3,4,5>1 9,10,11,12>13';

const ST_4093 = 'ST HCF4093B datasheet page 3, one input driven, typical';
const PHILIPS_40106 = 'Philips HEF40106B, January 1995, typical';
export const THRESHOLDS_4093: readonly SchmittThreshold[] = [
  { maker: 'ST', supplyVolts: 5, upVolts: 2.9, downVolts: 1.9, basis: 'datasheet', source: ST_4093 },
  { maker: 'ST', supplyVolts: 10, upVolts: 5.9, downVolts: 3.9, basis: 'datasheet', source: ST_4093 },
  { maker: 'ST', supplyVolts: 15, upVolts: 8.8, downVolts: 5.8, basis: 'datasheet', source: ST_4093 },
];
export const THRESHOLDS_40106: readonly SchmittThreshold[] = [
  { maker: 'Philips', supplyVolts: 5, upVolts: 3, downVolts: 2.2, basis: 'datasheet', source: PHILIPS_40106 },
  { maker: 'Philips', supplyVolts: 10, upVolts: 5.8, downVolts: 4.5, basis: 'datasheet', source: PHILIPS_40106 },
  { maker: 'Philips', supplyVolts: 15, upVolts: 8.3, downVolts: 6.5, basis: 'datasheet', source: PHILIPS_40106 },
];

interface Extra {
  readonly schmitt?: boolean;
  readonly unbuffered?: boolean;
  readonly thresholds?: readonly SchmittThreshold[];
  readonly cautions?: readonly Fact<string>[];
}

function logic(
  id: string,
  title: string,
  units: number,
  unitFunction: string,
  pins: Fact<PinOut> | null,
  extra: Extra = {},
): LogicFamily {
  return {
    id,
    kind: 'ic',
    group: 'logic',
    series: '4000',
    title,
    units,
    unitFunction,
    pinOut: pins,
    schmittInputs: practice(extra.schmitt ?? false, 'the function of the number, in every maker’s datasheet'),
    openDrain: practice(false, 'push-pull outputs throughout the 4000 series'),
    unbuffered: extra.unbuffered ?? false,
    supply: SUPPLY_4000,
    thresholds: extra.thresholds ?? [],
    cautions: extra.cautions ?? [],
  };
}

function gates(
  id: string,
  title: string,
  unitFunction: string,
  layout: string,
  extra: Extra & { readonly source?: string } = {},
): LogicFamily {
  const sixteen = layout === HEX16;
  const pins = gatePins(sixteen ? 16 : 14, layout, sixteen ? ['VDD', 1] : VDD14, sixteen ? ['VSS', 8] : VSS7);
  return logic(id, title, layout.split(' ').length, unitFunction, practice(pins, extra.source ?? TWO_DATASETS), extra);
}

function block(
  id: string,
  title: string,
  units: number,
  unitFunction: string,
  names: string,
  extra: Extra & { readonly source?: string } = {},
): LogicFamily {
  const pins = pinOut(names, `DIP-${names.split(' ').length}`);
  return logic(id, title, units, unitFunction, practice(pins, extra.source ?? TWO_DATASETS), extra);
}

const HIGH_INPUTS = practice(
  'Inputs may go above VDD, so it serves as a step-down level shifter; a 4069 may not.',
  'application notes of every maker',
);

export const LOGIC_4000_FAMILIES: readonly LogicFamily[] = [
  gates('4001', 'quad NOR', 'NOR2', QUAD),
  gates('4011', 'quad NAND', 'NAND2', QUAD),
  gates('4030', 'quad XOR', 'XOR2', QUAD),
  gates('4070', 'quad XOR', 'XOR2', QUAD),
  gates('4071', 'quad OR', 'OR2', QUAD),
  gates('4077', 'quad XNOR', 'XNOR2', QUAD),
  gates('4081', 'quad AND', 'AND2', QUAD),
  gates('4093', 'quad NAND, Schmitt', 'NAND2', QUAD, {
    schmitt: true,
    thresholds: THRESHOLDS_4093,
    cautions: [
      datasheet(
        'Hysteresis differs by maker (0.9 V against 1.5 V typical at 5 V), and with it the pitch of an RC oscillator.',
        'ST HCF4093B and Fairchild CD4093BC',
      ),
    ],
  }),
  gates('4012', 'dual NAND, 4 inputs', 'NAND4', DUAL4),
  gates('4002', 'dual NOR, 4 inputs', 'NOR4', DUAL4, { source: ONE_DATASET }),
  gates('4072', 'dual OR, 4 inputs', 'OR4', DUAL4, { source: ONE_DATASET }),
  gates('4082', 'dual AND, 4 inputs', 'AND4', DUAL4, { source: ONE_DATASET }),
  gates('4075', 'triple OR, 3 inputs', 'OR3', TRIPLE),
  gates('4023', 'triple NAND, 3 inputs', 'NAND3', TRIPLE, { source: ONE_DATASET }),
  gates('4025', 'triple NOR, 3 inputs', 'NOR3', TRIPLE, { source: ONE_DATASET }),
  gates('4073', 'triple AND, 3 inputs', 'AND3', TRIPLE, { source: ONE_DATASET }),
  gates('4069', 'hex inverter, unbuffered', 'NOT', HEX, { unbuffered: true }),
  gates('40106', 'hex inverter, Schmitt', 'NOT', HEX, { schmitt: true, thresholds: THRESHOLDS_40106 }),
  gates('4584', 'hex inverter, Schmitt', 'NOT', HEX, { schmitt: true }),
  gates('4049', 'hex inverting buffer', 'NOT', HEX16, { unbuffered: true, cautions: [HIGH_INPUTS] }),
  gates('4050', 'hex buffer', 'BUF', HEX16, { cautions: [HIGH_INPUTS] }),
  logic('4000', 'dual NOR, 3 inputs, and an inverter', 1, 'NOR3 pair and NOT', null),
  logic('4007', 'two complementary pairs and an inverter', 1, 'CMOS transistor pairs', null, { unbuffered: true }),
  logic(
    '4009',
    'hex inverting buffer, two supplies',
    6,
    'NOT',
    practice(pinOut('VCC Y1 A1 Y2 A2 Y3 A3 VSS A4 Y4 A5 Y5 NC A6 Y6 VDD', 'DIP-16'), ONE_DATASET),
  ),
  logic(
    '4010',
    'hex buffer, two supplies',
    6,
    'BUF',
    practice(pinOut('VCC Y1 A1 Y2 A2 Y3 A3 VSS A4 Y4 A5 Y5 NC A6 Y6 VDD', 'DIP-16'), ONE_DATASET),
  ),
  logic(
    '4068',
    'NAND/AND, 8 inputs',
    1,
    'NAND8',
    practice(pinOut('K1 A1 B1 C1 D1 NC VSS NC E1 F1 G1 H1 Y1 VDD', 'DIP-14'), ONE_DATASET),
  ),
  logic(
    '4078',
    'NOR/OR, 8 inputs',
    1,
    'NOR8',
    recalled(pinOut('K1 A1 B1 C1 D1 NC VSS NC E1 F1 G1 H1 Y1 VDD', 'DIP-14')),
  ),
  block(
    '4013',
    'dual D flip-flop, set and reset active high',
    2,
    'D flip-flop, active-high set and reset',
    'Q1 /Q1 CLK1 R1 D1 S1 VSS S2 D2 R2 CLK2 /Q2 Q2 VDD',
  ),
  block(
    '4027',
    'dual JK flip-flop',
    2,
    'JK flip-flop, active-high set and reset',
    'Q1 /Q1 CLK1 R1 K1 J1 S1 VSS S2 J2 K2 R2 CLK2 /Q2 Q2 VDD',
  ),
  block(
    '4015',
    'dual 4-bit shift register',
    2,
    '4-bit shift register',
    'CLKB Q4B Q3A Q2A Q1A RA DA VSS CLKA Q4A Q3B Q2B Q1B RB DB VDD',
  ),
  block(
    '4017',
    'decade counter, ten decoded outputs',
    1,
    'decade counter, decoded',
    'Q5 Q1 Q0 Q2 Q6 Q7 Q3 VSS Q8 Q4 Q9 CO INH CLK R VDD',
  ),
  block(
    '4018',
    'divide-by-N counter',
    1,
    'divide-by-N counter',
    'D P1 P2 /Q2 /Q1 /Q3 P3 VSS P4 PE /Q4 P5 /Q5 CLK R VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4020',
    '14-stage ripple counter',
    1,
    '14-stage ripple counter',
    'Q12 Q13 Q14 Q6 Q5 Q7 Q4 VSS Q1 /CLK R Q9 Q8 Q10 Q11 VDD',
  ),
  block(
    '4021',
    '8-bit shift register, parallel in',
    1,
    '8-bit shift register, parallel in',
    'D7 Q5 Q7 D3 D2 D1 D0 VSS PL CLK DS Q6 D4 D5 D6 VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4022',
    'octal counter, eight decoded outputs',
    1,
    'octal counter, decoded',
    'Q1 Q0 Q2 Q5 Q6 NC Q3 VSS NC Q7 Q4 CO INH CLK R VDD',
    { source: ONE_DATASET },
  ),
  block('4024', '7-stage ripple counter', 1, '7-stage ripple counter', '/CLK R Q7 Q6 Q5 Q4 VSS NC Q3 NC Q2 Q1 NC VDD'),
  block(
    '4028',
    'BCD to decimal decoder',
    1,
    'BCD to decimal decoder',
    'Q4 Q2 Q0 Q7 Q9 Q5 Q6 VSS Q8 A D C B Q1 Q3 VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4029',
    'up/down counter, binary or decade',
    1,
    'up/down counter',
    'PE Q4 J4 J1 CI Q1 CO VSS B/D U/D Q2 J2 J3 Q3 CLK VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4040',
    '12-stage ripple counter',
    1,
    '12-stage ripple counter',
    'Q12 Q6 Q5 Q7 Q4 Q3 Q2 VSS Q1 /CLK R Q9 Q8 Q10 Q11 VDD',
  ),
  logic('4042', 'quad D latch', 4, 'D latch', null),
  logic('4043', 'quad NOR RS latch', 4, 'RS latch, NOR', null),
  logic('4044', 'quad NAND RS latch', 4, 'RS latch, NAND', null),
  block(
    '4046',
    'phase-locked loop with VCO',
    1,
    'phase-locked loop',
    'PCP PC1 COMPIN VCOOUT INH C1A C1B VSS VCOIN SF R1 R2 PC2 SIGIN ZENER VDD',
    {
      cautions: [recalled('The VCO’s range and law differ between makers and from the 74HC4046.')],
    },
  ),
  block(
    '4047',
    'astable/monostable',
    1,
    'astable or monostable',
    'C R RC /ASTABLE ASTABLE -T VSS +T RESET Q /Q RETRIGGER OSC VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4060',
    '14-stage counter with oscillator',
    1,
    '14-stage counter with oscillator',
    'Q12 Q13 Q14 Q6 Q5 Q7 Q4 VSS CTC RTC RS R Q9 Q8 Q10 VDD',
  ),
  logic(
    '4094',
    '8-bit shift register with latch',
    1,
    '8-bit shift register with latch',
    recalled(pinOut('STR D CLK Q1 Q2 Q3 Q4 VSS QS /QS Q8 Q7 Q6 Q5 OE VDD', 'DIP-16')),
  ),
  block(
    '4098',
    'dual monostable',
    2,
    'monostable 0.5·R·C',
    'CX1 RXCX1 /R1 +T1 -T1 Q1 /Q1 VSS /Q2 Q2 -T2 +T2 /R2 RXCX2 CX2 VDD',
    {
      source: ONE_DATASET,
      cautions: [recalled('Pulse is about 0.5·R·C; a 4538 gives R·C, a 4528 less than half of it.')],
    },
  ),
  block(
    '40193',
    'up/down binary counter',
    1,
    'up/down counter, two clocks',
    'P1 Q1 Q0 DOWN UP Q2 Q3 VSS P3 P2 /LOAD /CO /BO R P0 VDD',
    { source: ONE_DATASET },
  ),
  block('4504', 'hex level shifter', 6, 'level shifter', 'VCC Y1 A1 Y2 A2 Y3 A3 VSS A4 Y4 A5 Y5 SEL A6 Y6 VDD', {
    source: ONE_DATASET,
  }),
  block(
    '4510',
    'up/down decade counter',
    1,
    'up/down decade counter',
    'PE Q4 P4 P1 CI Q1 CO VSS R U/D Q2 P2 P3 Q3 CLK VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4511',
    'seven-segment latch, decoder, driver',
    1,
    'seven-segment driver',
    'B C /LT /BI LE D A VSS QE QD QC QB QA QG QF VDD',
    { source: ONE_DATASET },
  ),
  logic(
    '4516',
    'up/down binary counter',
    1,
    'up/down binary counter',
    recalled(pinOut('PE Q4 P4 P1 CI Q1 CO VSS R U/D Q2 P2 P3 Q3 CLK VDD', 'DIP-16')),
  ),
  block(
    '4518',
    'dual decade counter',
    2,
    'decade up counter',
    'CLK1 EN1 Q1_1 Q2_1 Q3_1 Q4_1 R1 VSS CLK2 EN2 Q1_2 Q2_2 Q3_2 Q4_2 R2 VDD',
    { source: ONE_DATASET },
  ),
  block(
    '4520',
    'dual binary counter',
    2,
    'binary up counter',
    'CLK1 EN1 Q1_1 Q2_1 Q3_1 Q4_1 R1 VSS CLK2 EN2 Q1_2 Q2_2 Q3_2 Q4_2 R2 VDD',
  ),
  block(
    '4528',
    'dual monostable',
    2,
    'monostable, supply-dependent',
    'CX1 RXCX1 /R1 +T1 -T1 Q1 /Q1 VSS /Q2 Q2 -T2 +T2 /R2 RXCX2 CX2 VDD',
    {
      cautions: [recalled('Pulse is about 0.2 to 0.4·R·C and depends on VDD; a 4538 gives R·C.')],
    },
  ),
  block(
    '4538',
    'dual precision monostable',
    2,
    'monostable R·C',
    'CX1 RXCX1 /R1 +T1 -T1 Q1 /Q1 VSS /Q2 Q2 -T2 +T2 /R2 RXCX2 CX2 VDD',
  ),
  block('4541', 'programmable timer', 1, 'programmable timer', 'RTC CTC RS NC AR MR VSS Q SEL MODE NC A B VDD', {
    source: ONE_DATASET,
  }),
  block(
    '4543',
    'seven-segment latch, decoder for LCD',
    1,
    'seven-segment decoder, LCD',
    '/LE C B D A PH BL VSS QA QB QC QD QE QG QF VDD',
    { source: ONE_DATASET },
  ),
];
