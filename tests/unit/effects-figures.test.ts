/**
 * Figures against values worked by hand or published; the ngspice comparison stands in tests/reference. Textbook
 * formulas; the Schmitt thresholds are ST's HCF4093B, typical at 5 V.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { computeFigure, FigureError, type FigureValues } from '@/lib/electronics/effects/compute-figure';
import { effectOf } from '@/lib/electronics/effects/effect-of';
import { FORMULA_IDS, FORMULAS, type FormulaId } from '@/lib/electronics/effects/formulas';
import { toleranceSpread } from '@/lib/electronics/effects/tolerance-spread';

const GOOD: Readonly<Record<FormulaId, FigureValues>> = {
  'rc-low-pass': { r: 6800, c: 1e-9 },
  'rc-high-pass': { r: 10_000, c: 1e-9 },
  'lc-resonance': { l: 1e-3, c: 100e-12 },
  colpitts: { l: 100e-6, c1: 1e-9, c2: 1e-9 },
  'schmitt-rc': { vdd: 5, 'vt-up': 2.9, 'vt-down': 1.9, r: 22_000, c: 100e-12 },
  '555-astable': { ra: 1000, rb: 10_000, c: 100e-9 },
  'inverting-gain': { rin: 10_000, rf: 47_000 },
  'non-inverting-gain': { rg: 10_000, rf: 47_000 },
  divider: { vin: 12, r1: 33_000, r2: 10_000 },
  'time-constant': { r: 10_000, c: 100e-9 },
  'state-variable-centre': { r1: 10_000, c1: 1e-9, r2: 10_000, c2: 1e-9 },
  'volt-per-octave': { rin: 54_900, rb: 1000 },
};

describe('a figure is what the textbook says', () => {
  it.each<readonly [FormulaId, FigureValues, number]>([
    ['rc-low-pass', GOOD['rc-low-pass'], 23_405.139],
    ['rc-low-pass', { r: 10_000, c: 1e-9 }, 15_915.494],
    ['rc-high-pass', GOOD['rc-high-pass'], 15_915.494],
    ['lc-resonance', GOOD['lc-resonance'], 503_292.12],
    ['colpitts', GOOD.colpitts, 711_762.5],
    ['colpitts', { l: 330e-6, c1: 1e-9, c2: 2.2e-9 }, 334_138.72],
    ['schmitt-rc', GOOD['schmitt-rc'], 559_563.4],
    ['schmitt-rc', { vdd: 5, 'vt-up': 2.9, 'vt-down': 1.9, r: 100_000, c: 10e-9 }, 1231.0395],
    ['555-astable', GOOD['555-astable'], 686.9976],
    ['555-astable', { ra: 10_000, rb: 47_000, c: 10e-9 }, 1387.20677],
    ['inverting-gain', GOOD['inverting-gain'], -4.7],
    ['non-inverting-gain', GOOD['non-inverting-gain'], 5.7],
    ['divider', GOOD.divider, 2.79069767],
    ['divider', { ...GOOD.divider, rl: 100_000 }, 2.59179266],
    ['time-constant', GOOD['time-constant'], 1e-3],
    ['state-variable-centre', GOOD['state-variable-centre'], 15_915.494],
    // kT/q at 25 °C is 25.693 mV; times ln 2 is 17.809 mV for an octave at the base.
    ['volt-per-octave', GOOD['volt-per-octave'], 0.017809 * 55.9],
  ])('%s of %o', (formula, values, expected) => {
    const { value } = computeFigure(formula, values);
    expect(Math.abs(value / expected - 1)).toBeLessThan(2e-5);
  });
});

describe('a change is told in percent and in cents', () => {
  const corner = (c: number) => computeFigure('rc-low-pass', { r: 6800, c });
  it.each([
    [1, -0.990099, -17.226],
    [5, -4.7619, -84.467],
    [20, -16.66667, -315.641],
    [-10, 11.11111, 182.404],
  ])('%d %% more capacitance', (more, percent, cents) => {
    const effect = effectOf(corner(1e-9), corner(1e-9 * (1 + more / 100)));
    expect(effect.percent).toBeCloseTo(percent, 4);
    expect(effect.cents).toBeCloseTo(cents, 2);
  });

  it('an LC circuit moves half as many cents', () => {
    const tank = (c: number) => computeFigure('lc-resonance', { l: 1e-3, c });
    expect(effectOf(tank(1e-9), tank(1.01e-9)).cents).toBeCloseTo(-8.613, 3);
  });

  it('a gate of another maker shifts the oscillator: Philips 40106 for ST 4093 at 5 V is 395 cents', () => {
    const parts = { vdd: 5, r: 22_000, c: 1e-9 };
    const before = computeFigure('schmitt-rc', { ...parts, 'vt-up': 2.9, 'vt-down': 1.9 });
    const after = computeFigure('schmitt-rc', { ...parts, 'vt-up': 3, 'vt-down': 2.2 });
    expect(effectOf(before, after).cents).toBeCloseTo(395, 0);
  });

  it('a gain has no cents, and is never compared with a frequency', () => {
    const gain = computeFigure('inverting-gain', GOOD['inverting-gain']);
    expect(effectOf(gain, gain)).toMatchObject({ percent: 0, cents: null });
    expect(() => effectOf(gain, corner(1e-9))).toThrow(FigureError);
  });
});

describe('tolerances spread a figure', () => {
  const spread = (seed = 1) => toleranceSpread('rc-low-pass', GOOD['rc-low-pass'], { r: 5, c: 10 }, { seed });

  it('to 20264…27374 Hz at worst with 5 % and 10 %, and ±11.18 % by root sum square', () => {
    const { worstCase, rootSumSquare, nominal } = spread();
    expect(worstCase.low).toBeCloseTo(20_264.19, 1);
    expect(worstCase.high).toBeCloseTo(27_374.43, 1);
    expect(rootSumSquare.high / nominal - 1).toBeCloseTo(0.1118034, 5);
  });

  it('by Monte Carlo as an independent 200,000-run computation found: sd 6.52 %, 99 % of runs in −12.28 … +15.18 %', () => {
    const { monteCarlo, nominal } = toleranceSpread(
      'rc-low-pass',
      GOOD['rc-low-pass'],
      { r: 5, c: 10 },
      { seed: 12_345, runs: 200_000 },
    );
    expect(monteCarlo.standardDeviationPercent).toBeCloseTo(6.52, 1);
    expect(monteCarlo.low / nominal - 1).toBeCloseTo(-0.1228, 2);
    expect(monteCarlo.high / nominal - 1).toBeCloseTo(0.1518, 2);
  });

  it('inside the worst case, the same for the same seed and another for another', () => {
    expect(spread(7)).toEqual(spread(7));
    expect(spread(7).monteCarlo).not.toEqual(spread(8).monteCarlo);
    expect(spread().monteCarlo.low).toBeGreaterThan(spread().worstCase.low);
    expect(spread().monteCarlo.high).toBeLessThan(spread().worstCase.high);
  });

  it('and the looser part matters most; in a Colpitts C1 counts for 68.75 % and C2 for 31.25 %', () => {
    expect(spread().shares.map(({ input }) => input)).toEqual(['c', 'r']);
    const shares = toleranceSpread('colpitts', { l: 330e-6, c1: 1e-9, c2: 2.2e-9 }, { c1: 1, c2: 1 }).shares;
    expect(shares.map(({ percentPerPercent }) => percentPerPercent * -2)).toEqual([
      expect.closeTo(0.6875, 4),
      expect.closeTo(0.3125, 4),
    ]);
  });

  it('10,000 runs of the longest formula take under 50 ms', () => {
    const run = () => toleranceSpread('schmitt-rc', GOOD['schmitt-rc'], { 'vt-up': 5, 'vt-down': 5, r: 1, c: 10 });
    run();
    const times = [1, 2, 3, 4, 5].map(() => {
      const from = performance.now();
      run();
      return performance.now() - from;
    });
    // The least of five: other work on the machine only ever adds.
    expect(Math.min(...times)).toBeLessThan(50);
  });

  it.each<readonly [string, FigureValues]>([
    ['a negative tolerance', { r: -1 }],
    ['a tolerance of 100 %', { r: 100 }],
    ['a tolerance for a part that is not in the formula', { c3: 5 }],
    ['a tolerance that is no number', { r: Number.NaN }],
  ])('%s is refused', (_, tolerances) => {
    expect(() => toleranceSpread('rc-low-pass', GOOD['rc-low-pass'], tolerances)).toThrow(FigureError);
  });

  it.each([0, -1, 1.5, Number.NaN, 2_000_000])('%d runs are refused', (runs) => {
    expect(() => toleranceSpread('rc-low-pass', GOOD['rc-low-pass'], { r: 1 }, { runs })).toThrow(FigureError);
  });
});

function problemOf(formula: FormulaId, values: FigureValues): unknown {
  try {
    return computeFigure(formula, values);
  } catch (error) {
    return error instanceof FigureError ? `${error.problem} ${error.input}` : error;
  }
}

describe('a figure that cannot be computed says which input and why', () => {
  const required = FORMULA_IDS.flatMap((id) =>
    FORMULAS[id].inputs.filter(({ fallback }) => fallback === undefined).map(({ name }) => [id, name] as const),
  );

  it.each(required)('%s without %s', (id, name) => {
    const { [name]: _, ...rest } = GOOD[id];
    expect(problemOf(id, rest)).toBe(`missing-input ${name}`);
  });

  it.each(required)('%s with %s zero, negative or no number', (id, name) => {
    expect(problemOf(id, { ...GOOD[id], [name]: 0 })).toBe(`not-positive ${name}`);
    expect(problemOf(id, { ...GOOD[id], [name]: -1 })).toBe(`not-positive ${name}`);
    expect(problemOf(id, { ...GOOD[id], [name]: Number.POSITIVE_INFINITY })).toBe(`not-a-number ${name}`);
  });

  it('thresholds the wrong way round, or above the supply', () => {
    expect(problemOf('schmitt-rc', { ...GOOD['schmitt-rc'], 'vt-up': 1 })).toBe('contradiction null');
    expect(problemOf('schmitt-rc', { ...GOOD['schmitt-rc'], vdd: 2.5 })).toBe('contradiction null');
  });

  it('an input that the formula has not', () => {
    expect(problemOf('rc-low-pass', { ...GOOD['rc-low-pass'], l: 1 })).toBe('unknown-input l');
  });
});

it('a corner goes down as either part goes up, whatever the values', () => {
  const positive = fc.double({ min: 1e-12, max: 1e9, noNaN: true });
  fc.assert(
    fc.property(positive, positive, (r, c) => {
      const at = (k: number) => computeFigure('rc-low-pass', { r: r * k, c }).value;
      return at(1.1) < at(1) && Math.abs(at(2) / at(1) - 0.5) < 1e-9;
    }),
  );
});
