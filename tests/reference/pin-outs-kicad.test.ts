/**
 * Pin-outs and lead orders of every family carried, against the symbol files of Debian's kicad-symbols 6.0.10. Where
 * our table was drawn from the same dataset (sound chips, some counters) agreement shows a faithful copy, not an
 * independent source; gates, op-amps and the common transistors were tabulated from datasheets first.
 */
import { describe, expect, it } from 'vitest';
import { familyOf } from '@/lib/electronics/families/family-of';
import type { Family, PinOut } from '@/lib/electronics/families/family';
import { findFamily } from '@/lib/electronics/families/find-family';
import { gateUnits } from '@/lib/electronics/stand-in/pin-comparison';
import { type DatasetPin, type DatasetSymbol, readLibrary } from './kicad-symbols';
import { WORDS } from './kicad-words';

const LIBRARIES = [
  '4xxx',
  '4xxx_IEEE',
  '74xx',
  'Amplifier_Audio',
  'Amplifier_Operational',
  'Analog',
  'Analog_Switch',
  'Audio',
  'Comparator',
  'Diode',
  'Isolator',
  'Reference_Voltage',
  'Regulator_Linear',
  'Timer',
  'Transistor_Array',
  'Transistor_BJT',
  'Transistor_FET',
];

/** Families that the dataset covered and agreed with when this was written; the number may only grow. */
const FAMILIES_COVERED = 460;

/** Where the dataset is wrong, by library/symbol. */
const DATASET_ERRORS: Readonly<Record<string, string>> = {
  '4xxx_IEEE/4002': 'pin 5 missing, pin 12 drawn as a supply pin in both units (as in its 4012)',
  '4xxx_IEEE/4012': 'pin 5 missing, pin 12 drawn as a supply pin in both units',
  '4xxx_IEEE/4072': 'pin 5 missing, pin 12 drawn as a supply pin in both units',
  '4xxx_IEEE/4027': 'pin 8 named VDD; it is VSS',
  '4xxx_IEEE/4040': 'output names skip Q1 (Q0, Q2 … Q13)',
  '4xxx_IEEE/4053': 'pin 3 named Z0; it is Z1',
  '4xxx_IEEE/4067': 'names of another chip: pin 3 is A3 twice, pin 14 is Q12 and A2, pin 16 missing',
  '4xxx_IEEE/4078': 'inputs from pin 5 on drawn as outputs and a supply pin, all unnamed',
  '4xxx_IEEE/4504': 'its twelve signal pins unnamed, all in one unit (the drawing in 4xxx is complete)',
  'Isolator/6N138': 'LED leads named C1 and C2 where every sheet has anode and cathode; base named VO1',
  'Isolator/6N139': 'LED leads named C1 and C2 where every sheet has anode and cathode; base named VO1',
};

/** Symbols that show another case than the table's, or a case whose order differs by intention. */
const OTHER_CASE: Readonly<Record<string, string>> = {
  'Amplifier_Operational/OP249GS': 'its SO-8 has another order than its DIP-8 (as the LT1013’s)',
  'Analog_Switch/DG419LDJ_Maxim': 'this maker’s low-voltage version has no logic supply pin',
  'Analog_Switch/DG419LDY_Maxim': 'this maker’s low-voltage version has no logic supply pin',
  'Analog_Switch/DG419LEUA_Maxim': 'this maker’s low-voltage version has no logic supply pin',
};

const plain = (name: string): string =>
  name
    .toUpperCase()
    .replace(/~\{([^}]*)\}/g, '$1')
    .replace(/[~/{}_\s]/g, '');

function translated(family: Family, symbol: DatasetSymbol, name: string): string {
  const theirs = plain(name);
  const rule = WORDS.find(([families, from]) => families.test(`${family.id}@${symbol.library}`) && from.test(theirs));
  return rule === undefined ? theirs : theirs.replace(rule[1], rule[2]);
}

const POSITIVE = new Set(['VDD', 'VCC', 'V+', '+V', '+VS']);
const NEGATIVE = new Set(['VSS', 'GND', 'V-', '-V', '-VS', 'VEE']);

/** Our name, the name without the unit it belongs to (`CLK1`, `Q1_2`, `Q4A`), and what the dataset calls the same. */
function formsOf(own: string): Set<string> {
  const name = plain(own);
  const bare = [name, name.replace(/^(Q\d)[12]$/, '$1'), name.replace(/[12]$/, ''), name.replace(/[AB]$/, '')];
  const forms = new Set(bare);
  for (const [words, ours] of SYNONYMS)
    if (bare.some((form) => form === ours)) for (const word of words.split(' ')) forms.add(word);
  if (POSITIVE.has(name)) for (const word of POSITIVE) forms.add(word);
  if (NEGATIVE.has(name)) for (const word of NEGATIVE) forms.add(word);
  return forms;
}

const SYNONYMS: readonly (readonly [string, string])[] = [
  ['C CP CP0 CK CLOCK CLKIN', 'CLK'],
  ['CKEN CP1 ENABLE E', 'INH'],
  ['ENABLE CP1', 'EN'],
  ['MR RST RESET CLR R', 'R'],
  ['COUT TC', 'CO'],
  ['CIN CE', 'CI'],
  ['PL PE', 'PE'],
  ['CEXT CX', 'CX'],
  ['RCEXT RXCX RX RX1CX1 RX2CX2', 'RXCX'],
  ['CLK+ B +TR +TR1 +TR2 TR', '+T'],
  ['CLK- A -TR -TR1 -TR2', '-T'],
  ['RESET1 RESET2', 'R'],
  ['VI VIN', 'IN'],
  ['VO VOUT', 'OUT'],
  ['TR TRIGGER', 'TRIG'],
  ['Q', 'OUT'],
  ['R', 'RESET'],
  ['DIS', 'DISCH'],
  ['+', 'IN+'],
  ['-', 'IN-'],
];

/** Gates: inputs and output of each unit by electrical type, and the supply pins by name. */
function compareGates(ours: PinOut, symbol: DatasetSymbol): string | null {
  const units = byUnit(symbol.pins.filter((pin) => pin.type !== 'power_in' && pin.type !== 'no_connect'));
  const isOutput = (pin: DatasetPin): boolean => ['output', 'open_collector', 'tri_state'].includes(pin.type);
  const theirs = units
    .map((pins) => {
      const numbers = (output: boolean): string =>
        pins
          .filter((pin) => isOutput(pin) === output)
          .map((pin) => Number(pin.number))
          .sort((a, b) => a - b)
          .join(',');
      return `${numbers(false)}>${numbers(true)}`;
    })
    .sort()
    .join(' ');
  if (theirs !== gateUnits(ours)) return `units ${theirs} in the dataset, ${gateUnits(ours)} here`;
  return compareSupplies(ours, symbol);
}

function byUnit(pins: readonly DatasetPin[]): DatasetPin[][] {
  const units = new Map<number, DatasetPin[]>();
  for (const pin of pins) units.set(pin.unit, [...(units.get(pin.unit) ?? []), pin]);
  return [...units.values()];
}

function compareSupplies(ours: PinOut, symbol: DatasetSymbol): string | null {
  const power = symbol.pins.filter((pin) => pin.type === 'power_in' && !/^(?:PAD|EP|~)$/.test(pin.name));
  for (const pin of power) {
    const own = ours.pins[Number(pin.number) - 1] ?? 'none';
    if (!formsOf(own).has(plain(pin.name))) return `pin ${pin.number} is ${pin.name} in the dataset, ${own} here`;
  }
  return null;
}

/** Amplifiers, comparators, OTAs: + and − inputs and the output of each unit, and the supplies. */
function compareAmplifiers(ours: PinOut, symbol: DatasetSymbol): string | null {
  const theirs = byUnit(symbol.pins)
    .map((pins) =>
      pins.flatMap((pin) =>
        pin.name === '+' || pin.name === '-'
          ? [`${pin.name}${pin.number}`]
          : pin.type === 'output' || pin.type === 'open_collector'
            ? [`=${pin.number}`]
            : [],
      ),
    )
    .filter((unit) => unit.length > 0);
  const own = new Map<string, string[]>();
  ours.pins.forEach((name, index) => {
    const form = /^(IN|OUT|BUFOUT)(\d?)([+-]?)$/.exec(name);
    if (form === null) return;
    const unit = form[1] === 'BUFOUT' ? `buffer ${form[2] ?? ''}` : (form[2] ?? '');
    own.set(unit, [...(own.get(unit) ?? []), `${form[1] === 'IN' ? (form[3] ?? '') : '='}${index + 1}`]);
  });
  const say = (units: readonly (readonly string[])[]): string =>
    units
      .map((unit) => [...unit].sort().join(' '))
      .sort()
      .join(' | ');
  if (say(theirs) !== say([...own.values()])) return `${say(theirs)} in the dataset, ${say([...own.values()])} here`;
  return compareSupplies(ours, symbol);
}

/** Switches: the two contacts of each, in either order, and what closes it. */
function compareSwitches(ours: PinOut, symbol: DatasetSymbol): string | null {
  const contacts = byUnit(symbol.pins.filter((pin) => pin.type !== 'power_in' && pin.type !== 'no_connect'));
  for (const pins of contacts) {
    const own = pins.map((pin) => ours.pins[Number(pin.number) - 1] ?? 'none').sort();
    const unit = own[0]?.slice(1) ?? '';
    if (own.join(' ') !== `C${unit} Y${unit} Z${unit}`) return `one switch of the dataset joins ${own.join(' ')} here`;
    const control = pins.find((pin) => pin.type === 'input');
    if (control !== undefined && ours.pins[Number(control.number) - 1] !== `C${unit}`)
      return `pin ${control.number} closes the switch in the dataset`;
  }
  return compareSupplies(ours, symbol);
}

const COUNTS_FROM_ZERO = /^([QPJ])(\d+)$/;

/** Named pins, where the dataset may count outputs from zero and leaves the unit out of the name. */
function compareNames(family: Family, ours: PinOut, symbol: DatasetSymbol): string | null {
  const differing = (shift: number): string[] =>
    symbol.pins.flatMap((pin) => {
      const own = ours.pins[Number(pin.number) - 1] ?? 'none';
      // Amplifier outputs and optocoupler leads go unnamed in the dataset; pins of logic never do in this comparison.
      if (pin.name === '~' && (family.group !== 'logic' || own === 'NC')) return [];
      if ((own === 'NC' && pin.type === 'no_connect') || /^(?:PAD|EP)$/.test(pin.name)) return [];
      const theirs = translated(family, symbol, pin.name).replace(
        COUNTS_FROM_ZERO,
        (_, letter: string, number: string) => `${letter}${Number(number) + shift}`,
      );
      return formsOf(own).has(theirs) ? [] : [`${pin.number}: ${pin.name} ≠ ${own}`];
    });
  const differ = [0, 1].map(differing).sort((a, b) => a.length - b.length)[0] ?? [];
  return differ.length === 0 ? unitsApart(ours, symbol) : differ.join(', ');
}

/** In dual parts all pins of our first unit must lie in one unit of the dataset. */
function unitsApart(ours: PinOut, symbol: DatasetSymbol): string | null {
  for (const suffix of ['1', '2']) {
    const units = new Set(
      symbol.pins
        .filter(
          (pin) =>
            pin.unit > 0 &&
            new RegExp(`^/?(?:CLK|D|S|R|J|K|EN|CX|RXCX|[+]T|-T)${suffix}$`).test(
              ours.pins[Number(pin.number) - 1] ?? '',
            ),
        )
        .map((pin) => pin.unit),
    );
    const drawnInUnits = new Set(symbol.pins.map((pin) => pin.unit)).size > 2;
    if (drawnInUnits && units.size > 1) return `pins of unit ${suffix} lie in several units of the dataset`;
  }
  return null;
}

function compare(family: Family, symbol: DatasetSymbol): string | null {
  const ours = family.pinOut?.value;
  if (ours === undefined) return 'no pins here';
  if (gateUnits(ours) !== '') return compareGates(ours, symbol);
  if (family.group === 'op-amp' || family.group === 'comparator' || family.group === 'ota')
    return compareAmplifiers(ours, symbol);
  if (ours.pins.includes('Z2') && ours.pins.includes('C2')) return compareSwitches(ours, symbol);
  return compareNames(family, ours, symbol);
}

/** A symbol with nothing but unnamed pins says nothing that could be compared. */
function tells(family: Family, symbol: DatasetSymbol): boolean {
  if (family.group !== 'optocoupler' && family.group !== 'reference') return true;
  return symbol.pins.filter((pin) => pin.name !== '~').length * 2 >= symbol.pins.length;
}

/** Three-lead parts and dies in other cases have other orders: only the table's own case is compared. */
function sameCase(pins: PinOut, symbol: DatasetSymbol): boolean {
  const highest = Math.max(0, ...symbol.pins.map((pin) => Number(pin.number) || 0));
  if (highest > pins.pins.length + 1 || highest < pins.pins.length - 2) return false;
  if (pins.pins.length > 4 || symbol.footprint === '') return true;
  if (pins.pins.length === 2) return symbol.pins.length === 2;
  return symbol.footprint.toUpperCase().includes(pins.package);
}
interface Compared {
  readonly familyId: string;
  readonly where: string;
  readonly difference: string | null;
}

function compareAll(): Compared[] {
  return LIBRARIES.flatMap(readLibrary).flatMap((symbol) => {
    const where = `${symbol.library}/${symbol.name}`;
    const name = familyOf(symbol.name);
    const family = name === null ? null : findFamily(name.familyId);
    if (family === null || family.pinOut === null || where in OTHER_CASE) return [];
    if (!sameCase(family.pinOut.value, symbol) || !tells(family, symbol)) return [];
    return [{ familyId: family.id, where, difference: compare(family, symbol) }];
  });
}

describe('pin-outs agree with the open dataset', () => {
  const compared = compareAll();

  it('in every symbol, but for the dataset’s own errors', () => {
    const differing = compared.filter(({ where, difference }) => difference !== null && !(where in DATASET_ERRORS));
    expect(differing.map(({ familyId, where, difference }) => `${familyId} ${where}: ${difference ?? ''}`)).toEqual([]);
  });

  it('and each listed error is still there: a mended dataset must be compared again', () => {
    for (const where of Object.keys(DATASET_ERRORS)) {
      expect(compared.find((one) => one.where === where)?.difference ?? null, where).not.toBeNull();
    }
  });

  it(`over at least ${FAMILIES_COVERED} families`, () => {
    const covered = new Set(compared.filter(({ difference }) => difference === null).map(({ familyId }) => familyId));
    expect(covered.size).toBeGreaterThanOrEqual(FAMILIES_COVERED);
  });

  it.each([
    '4093',
    '4011',
    '74hc00',
    '74hc14',
    '4066',
    '4051',
    'tl072',
    'tl074',
    'lm324',
    'lm13700',
    'lm311',
    'ne555',
    'bc547',
    '2n3904',
    '2sc1815',
    'bf245a',
    '7805',
    '7905',
    '78l05',
    'lm317',
    '1n4148',
    'as3340',
  ])('the %s among them', (id) => {
    expect(compared.some(({ familyId, difference }) => familyId === id && difference === null)).toBe(true);
  });

  it.each<readonly [string, string, readonly [number, string]]>([
    ['2n3904', 'Transistor_BJT/2N3904', [1, 'C']],
    ['4011', '4xxx/4011', [4, 'A2']],
    ['tl072', 'Amplifier_Operational/TL072', [2, 'IN1+']],
    ['7805', 'Regulator_Linear/L7805', [1, 'OUT']],
    ['4066', '4xxx/4066', [13, 'C2']],
    ['ne555', 'Timer/NE555P', [2, 'DISCH']],
  ])('and a slip in the table of the %s would be seen', (id, where, [pin, wrongName]) => {
    const family = findFamily(id);
    const symbol = readLibrary(where.split('/')[0] ?? '').find(({ name }) => where.endsWith(`/${name}`));
    if (family?.pinOut === null || family === null || symbol === undefined)
      throw new Error(`${where} is not to be found`);
    const pins = family.pinOut.value.pins.map((name, index) => (index === pin - 1 ? wrongName : name));
    expect(
      compare({ ...family, pinOut: { ...family.pinOut, value: { ...family.pinOut.value, pins } } }, symbol),
    ).not.toBeNull();
  });
});
