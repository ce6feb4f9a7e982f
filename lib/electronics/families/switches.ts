/** Analogue switches and multiplexers: the 4000 series, their 74HC cousins and the DG types. */
import { datasheet, pinOut, practice, recalled, supplyOf } from './fact';
import type { Fact, PinOut, Supply, SwitchFamily } from './family';
import { SUPPLY_4000 } from './logic-4000';

const TWO_DATASETS = 'two independent symbol datasets agree (KiCad 6, Lepton EDA)';
const ONE_DATASET = 'KiCad 6 symbol, read; no second source';
const HC_SUPPLY = supplyOf('2d 10d 11m', 'Philips 74HC4051 and Nexperia 74HC4066: 2-10 V; VCC-VEE at most 10 V');
const HCT_SUPPLY = supplyOf('4.5d 5.5d 11m', 'Philips 74HCT4051: VCC 4.5-5.5 V; VCC-VEE at most 10 V');
const DG_SUPPLY = supplyOf('5m 36m 44m', '');

function bilateral(
  id: string,
  title: string,
  units: number,
  unitFunction: string,
  pins: Fact<PinOut> | null,
  supply: Supply,
  onOhms: Fact<number> | null = null,
  cautions: readonly Fact<string>[] = [],
): SwitchFamily {
  return { id, kind: 'ic', group: 'switch', title, units, unitFunction, pinOut: pins, supply, onOhms, cautions };
}

const QUAD_4066 = 'Y1 Z1 Z2 Y2 C2 C3 VSS Y3 Z3 Z4 Y4 C4 C1 VDD';
const P4051 = 'X4 X6 X X7 X5 INH VEE VSS C B A X3 X0 X1 X2 VDD';
const P4052 = 'Y0 Y2 Y Y3 Y1 INH VEE VSS B A X3 X0 X X1 X2 VDD';
const P4053 = 'Y1 Y0 Z1 Z Z0 INH VEE VSS C B A X0 X1 X Y VDD';
const P4316 = '1Z 1Y 2Y 2Z 2S 3S /E GND VEE 3Z 3Y 4Y 4Z 4S 1S VCC';
const P4067 = 'X X7 X6 X5 X4 X3 X2 X1 X0 A B VSS D C INH X15 X14 X13 X12 X11 X10 X9 X8 VDD';
const DG_QUAD_VL = 'C1 Y1 Z1 V- GND Z4 Y4 C4 C3 Y3 Z3 VL V+ Z2 Y2 C2';
const DG_QUAD = 'C1 Y1 Z1 V- GND Z4 Y4 C4 C3 Y3 Z3 NC V+ Z2 Y2 C2';
const hc = (names: string): string => names.replace('VDD', 'VCC').replace('VSS', 'GND');
const on16 = (names: string, source: string): Fact<PinOut> =>
  practice(pinOut(names, `DIP-${names.split(' ').length}`), source);

export const SWITCH_FAMILIES: readonly SwitchFamily[] = [
  bilateral(
    '4016',
    'quad bilateral switch',
    4,
    'bilateral switch',
    on16(QUAD_4066, TWO_DATASETS),
    SUPPLY_4000,
    datasheet(230, 'HEF4016B, typical at 10 V; 8000 Ω at 5 V'),
  ),
  bilateral(
    '4066',
    'quad bilateral switch',
    4,
    'bilateral switch',
    on16(QUAD_4066, TWO_DATASETS),
    SUPPLY_4000,
    recalled(80),
  ),
  bilateral(
    '4051',
    '8-channel multiplexer',
    1,
    '8-channel multiplexer',
    on16(P4051, TWO_DATASETS),
    SUPPLY_4000,
    recalled(125),
  ),
  bilateral(
    '4052',
    'dual 4-channel multiplexer',
    2,
    '4-channel multiplexer',
    on16(P4052, TWO_DATASETS),
    SUPPLY_4000,
    recalled(125),
  ),
  bilateral(
    '4053',
    'triple 2-channel multiplexer',
    3,
    '2-channel multiplexer',
    on16(P4053, TWO_DATASETS),
    SUPPLY_4000,
    recalled(125),
  ),
  bilateral(
    '4067',
    '16-channel multiplexer',
    1,
    '16-channel multiplexer',
    on16(P4067, 'KiCad 6 symbol of the 74HC4067, same pins'),
    SUPPLY_4000,
    recalled(125),
  ),
  bilateral(
    '4097',
    'dual 8-channel multiplexer',
    2,
    '8-channel multiplexer',
    on16('X X7 X6 X5 X4 X3 X2 X1 X0 A B VSS INH C Y7 Y6 Y Y5 Y4 Y3 Y2 Y1 Y0 VDD', ONE_DATASET),
    SUPPLY_4000,
    recalled(125),
  ),
  ...(['hc', 'hct'] as const).flatMap((series) => {
    const supply = series === 'hc' ? HC_SUPPLY : HCT_SUPPLY;
    const name = series.toUpperCase();
    return [
      bilateral(
        `74${series}4066`,
        `quad bilateral switch (74${name})`,
        4,
        'bilateral switch',
        on16(hc(QUAD_4066), TWO_DATASETS),
        supply,
        datasheet(50, 'Nexperia 74HC4066, typical at 4.5 V'),
      ),
      bilateral(
        `74${series}4051`,
        `8-channel multiplexer (74${name})`,
        1,
        '8-channel multiplexer',
        on16(hc(P4051), TWO_DATASETS),
        supply,
        recalled(70),
      ),
      bilateral(
        `74${series}4052`,
        `dual 4-channel multiplexer (74${name})`,
        2,
        '4-channel multiplexer',
        on16(hc(P4052), 'keeps the 4000-series pins'),
        supply,
        recalled(70),
      ),
      bilateral(
        `74${series}4053`,
        `triple 2-channel multiplexer (74${name})`,
        3,
        '2-channel multiplexer',
        on16(hc(P4053), 'keeps the 4000-series pins'),
        supply,
        recalled(70),
      ),
      bilateral(
        `74${series}4067`,
        `16-channel multiplexer (74${name})`,
        1,
        '16-channel multiplexer',
        on16(hc(P4067), ONE_DATASET),
        supply,
        recalled(70),
      ),
      bilateral(
        `74${series}4316`,
        `quad bilateral switch, split supply (74${name})`,
        4,
        'bilateral switch',
        on16(P4316, 'Lepton EDA symbol'),
        supply,
        recalled(70),
      ),
    ];
  }),
  bilateral(
    'dg201',
    'quad switch, closed at low',
    4,
    'bilateral switch, closed at low',
    recalled(pinOut(DG_QUAD, 'DIP-16')),
    DG_SUPPLY,
  ),
  bilateral(
    'dg202',
    'quad switch, closed at high',
    4,
    'bilateral switch, closed at high',
    recalled(pinOut(DG_QUAD, 'DIP-16')),
    DG_SUPPLY,
  ),
  bilateral(
    'dg211',
    'quad switch, closed at low, logic supply',
    4,
    'bilateral switch, closed at low',
    recalled(pinOut(DG_QUAD_VL, 'DIP-16')),
    DG_SUPPLY,
  ),
  bilateral(
    'dg212',
    'quad switch, closed at high, logic supply',
    4,
    'bilateral switch, closed at high',
    recalled(pinOut(DG_QUAD_VL, 'DIP-16')),
    DG_SUPPLY,
  ),
  bilateral(
    'dg308',
    'quad switch, closed at high',
    4,
    'bilateral switch, closed at high',
    on16(DG_QUAD, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg309',
    'quad switch, closed at low',
    4,
    'bilateral switch, closed at low',
    on16(DG_QUAD, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg411',
    'quad switch, closed at low, logic supply',
    4,
    'bilateral switch, closed at low',
    on16(DG_QUAD_VL, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg412',
    'quad switch, closed at high, logic supply',
    4,
    'bilateral switch, closed at high',
    on16(DG_QUAD_VL, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg413',
    'quad switch, two of each sense',
    4,
    'bilateral switch, mixed',
    on16(DG_QUAD_VL, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg441',
    'quad switch, closed at low',
    4,
    'bilateral switch, closed at low',
    on16(DG_QUAD, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral(
    'dg442',
    'quad switch, closed at high',
    4,
    'bilateral switch, closed at high',
    on16(DG_QUAD, ONE_DATASET),
    DG_SUPPLY,
  ),
  bilateral('dg403', 'dual two-way switch', 2, 'two-way switch pair', null, DG_SUPPLY),
  bilateral('dg419', 'two-way switch', 1, 'two-way switch', on16('D S1 GND V+ VL IN V- S2', ONE_DATASET), DG_SUPPLY),
  bilateral('adg1414', 'octal switch, serial', 8, 'serial bilateral switch', null, DG_SUPPLY),
  bilateral('max333', 'quad two-way switch', 4, 'two-way switch', null, DG_SUPPLY),
];
