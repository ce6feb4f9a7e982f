/**
 * Stand-ins as a builder judges them. Where a case rests on a document, the document is named; the rest is common
 * practice of the trade.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { listFamilies } from '@/lib/electronics/families/find-family';
import type { PartKind } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';
import { assess } from '@/lib/electronics/stand-in/assess';
import {
  type Assessment,
  type Outcome,
  type StandInContext,
  USES,
  type Use,
  type Verdict,
  verdictOf,
  effect,
  fail,
  pass,
  remark,
  unknown,
} from '@/lib/electronics/stand-in/check';
import { matrixOf, specOfFamily } from '@/lib/electronics/stand-in/matrix';
import { readRails } from '@/lib/electronics/stand-in/read-rails';

function judge(
  wanted: string,
  offered: string,
  rails: string,
  use: Use | null,
  kind: PartKind | null = null,
  more: Partial<StandInContext> = {},
): Assessment {
  return assess(readPartText(wanted, { kind }), readPartText(offered, { kind }), {
    rails: rails === '' ? [] : readRails(rails),
    use,
    ...more,
  });
}

const outcome = (assessment: Assessment, check: string): Outcome | null =>
  assessment.checks.find((one) => one.check === check)?.outcome ?? null;

type Case = readonly [
  wanted: string,
  offered: string,
  rails: string,
  use: Use | null,
  verdict: Verdict,
  check: string,
  outcome: Outcome,
];

describe('logic', () => {
  it.each<Case>([
    ['CD4093BE', 'CD4011BE', '+5', 'timing', 'refused', 'schmitt-inputs', 'fail'],
    ['CD4093BE', 'CD4011BE', '+5', 'control', 'refused', 'schmitt-inputs', 'fail'],
    ['CD4093BE', 'CD4011BE', '+5', null, 'ask', 'schmitt-inputs', 'unknown'],
    ['CD4093BE', 'CD4011BE', '+5', 'logic', 'with-effect', 'schmitt-inputs', 'note'],
    ['CD4011BE', 'CD4093BE', '+5', 'logic', 'drop-in', 'schmitt-inputs', 'note'],
    ['CD4011BE', 'CD4093BE', '+5', 'timing', 'with-effect', 'schmitt-inputs', 'note'],
    ['CD40106BE', 'CD4069UBE', '+12', 'timing', 'refused', 'schmitt-inputs', 'fail'],
    ['CD4069UBE', 'CD40106BE', '+12', 'audio', 'refused', 'schmitt-inputs', 'fail'],
    // 74HC1G14 sheet: 2 to 6 V, 7 V absolute maximum.
    ['CD40106BE', '74HC14N', '±12', 'logic', 'refused', 'supply', 'fail'],
    ['CD40106BE', '74HC14N', '+5', 'logic', 'drop-in', 'supply', 'pass'],
    ['CD40106BE', '74HC14N', '+5', 'timing', 'with-effect', 'schmitt-inputs', 'note'],
    ['CD4011BE', '74HC00N', '±12', 'logic', 'refused', 'supply', 'fail'],
    // KiCad and Lepton symbols: 4011 5,6>4 8,9>10; 7400 4,5>6 9,10>8.
    ['CD4011BE', '74HC00N', '+5', 'logic', 'refused', 'pin-out', 'fail'],
    ['CD4001BE', '74HC02N', '+5', 'logic', 'refused', 'pin-out', 'fail'],
    ['CD4093BE', '74HC132N', '+5', 'timing', 'refused', 'pin-out', 'fail'],
    ['CD4013BE', '74HC74N', '+5', 'logic', 'refused', 'pin-out', 'fail'],
    ['CD4030BE', 'CD4070BE', '+12', 'logic', 'drop-in', 'pin-out', 'pass'],
    ['74HC14N', 'CD40106BE', '+5', 'logic', 'with-effect', 'drive', 'note'],
    ['74HC00N', '74HCT00N', '+5', 'logic', 'with-effect', 'input-levels', 'note'],
    ['74HC04N', '74HCT04N', '+5', 'timing', 'refused', 'input-levels', 'fail'],
    ['CD4049UBE', 'CD4069UBE', '+12', 'logic', 'refused', 'pin-out', 'fail'],
    ['CD4077BE', 'SN74LS266N', '+5', 'logic', 'ask', 'output-kind', 'unknown'],
    ['CD4011BE', 'CD4001BE', '+12', 'logic', 'refused', 'unit-function', 'fail'],
    ['CD4093BE', 'HEF4093BP', '+5', 'timing', 'with-effect', 'schmitt-inputs', 'note'],
    ['CD4093BE', 'HEF4093BP', '+5', 'logic', 'drop-in', 'part', 'pass'],
    ['CD4538BE', 'CD4528BE', '+12', 'timing', 'refused', 'unit-function', 'fail'],
  ])('%s replaced by %s on %s for %s: %s', (wanted, offered, rails, use, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });

  it('says by how much other Schmitt thresholds shift an oscillator (ST 4093 and Philips 40106 sheets, 395 cents)', () => {
    // Units differ, so only the sentence is looked at.
    const why = judge('CD4093BE', 'CD40106BE', '+5', 'timing').checks.find(
      ({ check }) => check === 'schmitt-inputs',
    )?.why;
    expect(why).toContain('395 cents higher');
  });
});

describe('analogue switches', () => {
  it.each<Case>([
    ['CD4066BE', 'CD4016BE', '+12', 'audio', 'with-effect', 'on-resistance', 'note'],
    // Philips 74HC4051 sheet: 2 to 10 V.
    ['CD4051BE', '74HC4051N', '±12', 'audio', 'refused', 'supply', 'fail'],
    ['CD4051BE', '74HC4051N', '+5', 'control', 'drop-in', 'supply', 'pass'],
    ['CD4066BE', '74HC4316N', '+5', 'audio', 'refused', 'pin-out', 'fail'],
  ])('%s replaced by %s on %s for %s: %s', (wanted, offered, rails, use, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });
});

describe('op-amps', () => {
  it.each<Case>([
    // Microchip MCP6001/2/4 sheet: 1.8 to 6 V.
    ['TL072CP', 'MCP6002-I/P', '±12', 'audio', 'refused', 'supply', 'fail'],
    ['TL072CP', 'MCP6002-I/P', '+12', null, 'refused', 'supply', 'fail'],
    // ST and TI TL072 sheets: inputs from 3 V above the lower rail, outputs to 1.5 V of either.
    ['MCP6002-I/P', 'TL072CP', '+5', 'control', 'refused', 'supply', 'fail'],
    ['MCP6002-I/P', 'TL072CP', '+5', 'control', 'refused', 'output-swing', 'fail'],
    ['MCP6002-I/P', 'TL072CP', '+5', 'control', 'refused', 'input-range', 'fail'],
    ['MCP6002-I/P', 'LM358N', '+5', 'audio', 'refused', 'output-swing', 'fail'],
    ['MCP6002-I/P', 'TLV2372IP', '+5', 'control', 'drop-in', 'output-swing', 'pass'],
    ['TLC2272CP', 'TLV2372IP', '+5', 'control', 'with-effect', 'slew-rate', 'note'],
    ['TL072CP', 'TL082CP', '±12', 'audio', 'drop-in', 'family-step', 'note'],
    ['TL072CP', 'TL062CP', '±12', 'audio', 'with-effect', 'noise', 'note'],
    ['TL072CP', 'TL071CP', '±12', 'audio', 'refused', 'channels', 'fail'],
    ['TL072CP', 'TL074CN', '±12', 'audio', 'refused', 'pin-out', 'fail'],
    ['TL072CP', 'NE5532P', '±12', 'audio', 'with-effect', 'input-bias', 'note'],
    ['TL072CP', 'NE5532P', '±12', 'control', 'ask', 'input-bias', 'unknown'],
    ['TL072CP', 'NJM4558D', '±12', 'audio', 'with-effect', 'slew-rate', 'note'],
    ['TL072CP', 'LM358N', '±12', 'audio', 'refused', 'slew-rate', 'fail'],
    ['LM358N', 'TL072CP', '+12', 'control', 'refused', 'input-range', 'fail'],
    ['TL072CP', 'TL072CDT', '±12', 'audio', 'drop-in', 'part', 'pass'],
    ['TL072CP', 'TLC072CP', '±12', 'audio', 'ask', 'supply', 'unknown'],
    ['TL071CP', 'NE5534P', '±12', 'audio', 'refused', 'unity-gain', 'fail'],
    ['TL072CP', 'LM393P', '±12', 'control', 'refused', 'unit-function', 'fail'],
    ['LM393P', 'TL072CP', '±12', 'control', 'refused', 'unit-function', 'fail'],
    ['LM741CN', 'OP07CP', '±12', 'control', 'refused', 'pin-out', 'fail'],
  ])('%s replaced by %s on %s for %s: %s', (wanted, offered, rails, use, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });

  it('phase reversal is a note, and does not change the verdict by itself', () => {
    const check = judge('OPA2134PA', 'TL072CP', '±12', 'audio').checks.find((one) => one.check === 'phase-reversal');
    expect(check).toMatchObject({ outcome: 'note', changes: false });
  });
});

describe('OTAs, timers, regulators', () => {
  it.each<Case>([
    ['LM13700N', 'LM13600N', '±12', 'audio', 'with-effect', 'unit-function', 'note'],
    ['LM13700N', 'CA3080E', '±12', 'audio', 'refused', 'unit-function', 'fail'],
    ['NE555P', 'TLC555CP', '+12', 'timing', 'with-effect', 'drive', 'note'],
    ['NE555P', 'TLC555CP', '+12', 'power', 'refused', 'drive', 'fail'],
    ['NE555P', 'NE556N', '+12', 'timing', 'refused', 'pin-out', 'fail'],
    // Intersil ICM7555: from 2 V; NE555 from 4.5 V.
    ['ICM7555IPA', 'NE555P', '+3', 'timing', 'refused', 'supply', 'fail'],
    ['LM7805CT', 'L7805CV', '+12', 'power', 'drop-in', 'part', 'pass'],
    ['LM7812CT', 'LM7912CT', '+15', 'power', 'refused', 'polarity', 'fail'],
    ['LM7812CT', 'LM7912CT', '+15', 'power', 'refused', 'lead-order', 'fail'],
    ['LM7805CT', 'LM317T', '+12', 'power', 'refused', 'voltage', 'fail'],
    ['LM7805CT', 'LM7812CT', '+15', 'power', 'refused', 'voltage', 'fail'],
    ['LM7805CT', 'LM78L05ACZ', '+12', 'power', 'ask', 'current', 'unknown'],
    ['LM78L05ACZ', 'LM7805CT', '+12', 'power', 'with-effect', 'lead-order', 'note'],
    ['LM1117-5.0', 'LM7805CT', '+6', 'power', 'refused', 'dropout', 'fail'],
    ['CEM3340', 'AS3340', '±12', 'timing', 'drop-in', 'part', 'pass'],
    ['AS3340', 'AS3320', '±12', 'timing', 'refused', 'unit-function', 'fail'],
  ])('%s replaced by %s on %s for %s: %s', (wanted, offered, rails, use, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });
});

describe('transistors and diodes', () => {
  it.each<Case>([
    // KiCad 6: 2N3904 E B C, BC547 C B E.
    ['BC547B', '2N3904', '±12', 'audio', 'with-effect', 'lead-order', 'note'],
    ['2N3904', 'BC547B', '±12', 'control', 'with-effect', 'lead-order', 'note'],
    ['BC547B', 'BC557B', '±12', 'audio', 'refused', 'polarity', 'fail'],
    ['BC547B', 'BC548B', '±12', 'control', 'drop-in', 'voltage', 'note'],
    ['BC546B', 'BC548B', '±24', 'control', 'refused', 'voltage', 'fail'],
    ['BC547C', 'BC547A', '±12', 'audio', 'with-effect', 'gain-group', 'note'],
    ['BC547B', 'BC847B', '±12', 'audio', 'refused', 'mounting', 'fail'],
    ['BC549C', 'BC547C', '±12', 'audio', 'with-effect', 'noise', 'note'],
    ['BC547B', 'MPSA13', '±12', 'audio', 'refused', 'darlington', 'fail'],
    ['SSM2210', 'BC547B', '±12', 'timing', 'refused', 'matched-pair', 'fail'],
    ['PN2222A', 'P2N2222A', '±12', 'power', 'with-effect', 'lead-order', 'note'],
    ['J112', 'J111', '±12', 'control', 'ask', 'saturation-current', 'unknown'],
    ['J201', 'J201-D74Z', '±12', 'audio', 'ask', 'saturation-current', 'unknown'],
    ['J112', '2N7000', '±12', 'control', 'refused', 'unit-function', 'fail'],
    ['1N4148', '1N914', '±12', 'audio', 'drop-in', 'diode-kind', 'pass'],
    ['1N4148', 'BAT41', '±12', 'audio', 'refused', 'diode-kind', 'fail'],
    ['1N4148', 'BAT41', '±12', null, 'ask', 'diode-kind', 'unknown'],
    ['1N4148', '1N4007', '±12', 'audio', 'refused', 'diode-kind', 'fail'],
    ['1N4001', '1N4007', '±12', 'power', 'drop-in', 'voltage', 'pass'],
    ['1N4007', '1N4001', '±12', 'power', 'drop-in', 'voltage', 'note'],
    ['1N4007', '1N4001', '±40', 'power', 'refused', 'voltage', 'fail'],
    ['1N4001', '1N4148', '±12', 'power', 'refused', 'current', 'fail'],
    ['1N4001', '1N5819', '±12', 'power', 'with-effect', 'diode-kind', 'note'],
    ['1N34A', '1N4148', '±12', 'audio', 'refused', 'diode-kind', 'fail'],
    ['1N4733A', '1N4734A', '+12', 'power', 'refused', 'zener-voltage', 'fail'],
    ['1N4733A', 'BZX85C5V1', '+12', 'power', 'drop-in', 'zener-voltage', 'pass'],
    ['1N4733A', 'BZX55C5V1', '+12', 'power', 'ask', 'power', 'unknown'],
    ['1N4148', '1N4733A', '+12', 'power', 'refused', 'unit-function', 'fail'],
  ])('%s replaced by %s on %s for %s: %s', (wanted, offered, rails, use, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });
});

type PassiveCase = readonly [
  wanted: string,
  offered: string,
  rails: string,
  use: Use | null,
  kind: PartKind,
  verdict: Verdict,
  check: string,
  outcome: Outcome,
];

describe('resistors, capacitors, potentiometers', () => {
  it.each<PassiveCase>([
    ['10k', '10k 1%', '±12', 'audio', 'resistor', 'drop-in', 'value', 'pass'],
    ['10k 5%', '10.2k 1%', '±12', 'audio', 'resistor', 'drop-in', 'value', 'note'],
    ['10k 1%', '12k 1%', '±12', 'audio', 'resistor', 'with-effect', 'value', 'note'],
    ['10k', '100k', '±12', 'audio', 'resistor', 'refused', 'value', 'fail'],
    ['10k 1/2W', '10k 1/4W', '±12', 'audio', 'resistor', 'refused', 'power', 'fail'],
    ['10k 1%', '10k 5%', '±12', 'timing', 'resistor', 'with-effect', 'tolerance', 'note'],
    // EIA-198: X7R ±15 %, Y5V +22/−82 % over temperature.
    ['1n C0G', '1n X7R', '±12', 'timing', 'capacitor', 'refused', 'dielectric', 'fail'],
    ['1n X7R', '1n Y5V', '±12', 'timing', 'capacitor', 'refused', 'dielectric', 'fail'],
    ['100n X7R', '100n Z5U', '±12', 'timing', 'capacitor', 'refused', 'dielectric', 'fail'],
    ['1n C0G 50V', '1n polypropylene 63V', '±12', 'timing', 'capacitor', 'drop-in', 'dielectric', 'pass'],
    ['100n C0G 50V', '100n X7R 50V', '±12', 'decoupling', 'capacitor', 'drop-in', 'dielectric', 'note'],
    ['100n film 63V', '100n X7R 50V', '±12', 'audio', 'capacitor', 'with-effect', 'dielectric', 'note'],
    ['100n film 63V', '100n 50V electrolytic', '±12', 'audio', 'capacitor', 'refused', 'polarised', 'fail'],
    ['10u 25V electrolytic', '10u 10V electrolytic', '±12', 'decoupling', 'capacitor', 'refused', 'voltage', 'fail'],
    ['10u 25V electrolytic', '10u 16V electrolytic', '±12', 'decoupling', 'capacitor', 'drop-in', 'voltage', 'note'],
    ['10u 25V electrolytic', '10u 35V electrolytic', '±12', 'decoupling', 'capacitor', 'drop-in', 'voltage', 'pass'],
    // Solid tantalum at half its rating: maker's advice.
    ['10u 25V tantalum', '10u 16V tantalum', '±12', 'decoupling', 'capacitor', 'refused', 'voltage', 'fail'],
    ['10u 25V tantalum', '10u 35V tantalum', '±12', 'decoupling', 'capacitor', 'drop-in', 'voltage', 'pass'],
    ['10u 25V electrolytic', '22u 25V electrolytic', '±12', 'decoupling', 'capacitor', 'drop-in', 'value', 'note'],
    ['100k lin', '100k log', '±12', 'audio', 'potentiometer', 'refused', 'taper', 'fail'],
    ['B100k', 'A100k', '±12', 'audio', 'potentiometer', 'refused', 'taper', 'fail'],
    ['100k log', 'A100k', '±12', 'audio', 'potentiometer', 'ask', 'taper', 'unknown'],
    ['100k lin', '100k lin dual', '±12', 'audio', 'potentiometer', 'with-effect', 'gang', 'note'],
  ])('%s replaced by %s on %s for %s', (wanted, offered, rails, use, kind, verdict, check, expected) => {
    const assessment = judge(wanted, offered, rails, use, kind);
    expect(outcome(assessment, check)).toBe(expected);
    expect(assessment.verdict).toBe(verdict);
  });

  it('the line’s own tolerance wins over the part’s', () => {
    expect(judge('10k 1%', '11k 1%', '±12', 'audio', 'resistor', { lineTolerancePercent: 15 }).verdict).toBe('drop-in');
  });

  it('a surface resistor does not go into a through-hole place', () => {
    expect(judge('10k', '10k 0805', '±12', 'audio', 'resistor', { mounting: 'through-hole' }).verdict).toBe('refused');
  });
});

describe('safety parts are replaced by the identical certified part or not at all', () => {
  it.each<readonly [string, string, PartKind, Use | null]>([
    ['100n X2 275V', '100n 630V film', 'capacitor', null],
    ['4n7 Y2 250V', '4n7 1000V film', 'capacitor', 'audio'],
    ['F500mA', 'F1A', 'fuse', null],
    ['T1A 250V', 'F1A 250V', 'fuse', 'power'],
    ['mains transformer 2x12V', 'mains transformer 2x15V', 'transformer', 'power'],
    ['10k', '10k 1%', 'resistor', 'safety'],
    ['4N35', '4N25', 'optocoupler', 'safety'],
  ])('%s is not replaced by %s', (wanted, offered, kind, use) => {
    const assessment = judge(wanted, offered, '±12', use, kind);
    expect(assessment.verdict).toBe('refused');
    expect(assessment.checks.map(({ why }) => why).join(' ')).toMatch(/local electrical code.*licensed person/);
  });

  it('the identical part is the same', () => {
    expect(judge('100n X2 275V', '100n X2 275V', '', 'safety', 'capacitor').verdict).toBe('same');
  });

  it('away from the mains an optocoupler is asked about, not waved through', () => {
    expect(judge('4N35', '4N25', '+5', null).verdict).toBe('ask');
  });
});

describe('what holds of every assessment', () => {
  const families = listFamilies();
  const context = fc.record({
    rails: fc.constantFrom<readonly number[]>([], [5], [12], [12, -12], [15, -15], [12, 5, -12]),
    use: fc.constantFrom<Use | null>(null, ...USES),
  });
  const family = fc.constantFrom(...families.map((one) => one.id));
  const specs = new Map(families.map((one) => [one.id, specOfFamily(one)]));
  const texts = [
    '10k',
    '10k 1%',
    '100n X7R 50V',
    '22p C0G 5%',
    '10u 25V',
    'A100K',
    'TL072CP',
    'nonsense',
    'CD4093BE',
    'F1A',
    '',
  ];

  it.each(texts)('%j stands in for itself as the same part', (text) => {
    fc.assert(
      fc.property(
        context,
        (given) =>
          assess(readPartText(text, { kind: null }), readPartText(text, { kind: null }), given).verdict === 'same',
      ),
    );
  });

  it('a family stands in for itself as the same part, in any circuit', () => {
    fc.assert(
      fc.property(family, context, (id, given) => {
        const spec = specs.get(id);
        return spec !== undefined && assess(spec, spec, given).verdict === 'same';
      }),
    );
  });

  it('any two families get a verdict with a sentence for each check, and the verdict follows from the checks', () => {
    fc.assert(
      fc.property(family, family, context, (a, b, given) => {
        const [wanted, offered] = [specs.get(a), specs.get(b)];
        if (wanted === undefined || offered === undefined || a === b) return true;
        const { verdict, checks } = assess(wanted, offered, given);
        return (
          checks.length > 0 &&
          verdict === verdictOf(checks) &&
          checks.every(({ why }) => /^[A-ZÄÖÜ“0-9−+±].*[.?]$/.test(why) && !/undefined|NaN|null/.test(why))
        );
      }),
      { numRuns: 3_000 },
    );
  });

  it('a refused stand-in never becomes acceptable by asking for more', () => {
    const stricter: readonly (readonly [string, string])[] = [
      ['10k', '10k 1%'],
      ['10k 5%', '10k 0.1%'],
      ['10k', '10k 1W'],
      ['10u', '10u 63V'],
      ['100n', '100n C0G'],
      ['100n X7R', '100n X7R 100V'],
    ];
    const offers = [
      '10k',
      '12k',
      '10k 5%',
      '10k 1/4W',
      '10u 16V electrolytic',
      '10u 6.3V',
      '100n Y5V',
      '100n X7R 50V',
      '100n C0G',
    ];
    for (const [loose, strict] of stricter) {
      const kind: PartKind = loose.includes('k') ? 'resistor' : 'capacitor';
      for (const offered of offers) {
        const before = judge(loose, offered, '±12', 'timing', kind).verdict;
        if (before === 'refused') expect(judge(strict, offered, '±12', 'timing', kind).verdict).toBe('refused');
      }
    }
  });

  it('a fact from memory alone neither refuses nor lets through', () => {
    // TLC072 limits are recalled: 24 V on 16 V asks. LM833 noise and drive are recalled too, but its rails are common practice.
    expect(judge('TL072', 'TLC072', '±12', 'audio').verdict).toBe('ask');
    const limits = judge('2N3904', '2N4401', '±12', 'control').checks.find(({ check }) => check === 'voltage');
    expect(limits).toMatchObject({ outcome: 'note', changes: true });
    expect(limits?.why).toContain('memory');
  });

  it('an unknown part is asked about', () => {
    expect(judge('TL072CP', 'XYZ999QQ', '±12', 'audio').verdict).not.toMatch(/same|drop-in|with-effect/);
  });

  it('the matrix of a group judges each pair as assess does, and only the diagonal is the same part', () => {
    const given: StandInContext = { rails: [12, -12], use: null };
    const matrix = matrixOf('op-amp', given);
    matrix.verdicts.forEach((row, wanted) => {
      row.forEach((verdict, offered) => {
        expect(verdict === 'same').toBe(wanted === offered);
      });
    });
  });
});

describe('findings become a verdict in one order', () => {
  const words = ['check', 'a', 'b', 'Because.'] as const;
  it.each<readonly [string, Verdict, Parameters<typeof verdictOf>[0]]>([
    ['a fail refuses whatever else', 'refused', [pass(...words), unknown(...words), fail(...words)]],
    ['an unknown asks', 'ask', [pass(...words), effect(...words), unknown(...words)]],
    ['a change has an effect', 'with-effect', [pass(...words), remark(...words), effect(...words)]],
    ['a harmless note is a drop-in', 'drop-in', [pass(...words), remark(...words)]],
    ['no finding asks', 'ask', []],
  ])('%s', (_, verdict, checks) => {
    expect(verdictOf(checks)).toBe(verdict);
  });
});
