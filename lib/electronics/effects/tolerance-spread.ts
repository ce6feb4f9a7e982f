/** How far a figure spreads by its parts' tolerances: worst case, root of the sum of squares, and a seeded Monte Carlo. */
import { FigureError, type FigureValues, inputsOf } from './compute-figure';
import { FORMULAS, type FormulaId, type Inputs } from './formulas';

export interface Band {
  readonly low: number;
  readonly high: number;
}

export interface Share {
  readonly input: string;
  /** Percent that the figure moves for one percent of this input. */
  readonly percentPerPercent: number;
  /** Percent that it moves for the whole tolerance of this input. */
  readonly percent: number;
}

export interface Spread {
  readonly nominal: number;
  /** All parts at the ends of their tolerances, the worst way together. */
  readonly worstCase: Band;
  /** First order: √Σ(sensitivity·tolerance)², about the nominal figure. */
  readonly rootSumSquare: Band;
  /** Values spread evenly over each tolerance; the band holds 99 % of the runs. */
  readonly monteCarlo: Band & {
    readonly mean: number;
    readonly standardDeviationPercent: number;
    readonly runs: number;
    readonly seed: number;
  };
  /** The parts that matter most, first. */
  readonly shares: readonly Share[];
}

export interface SpreadOptions {
  readonly seed?: number;
  readonly runs?: number;
}

/** Corners double with each input: no formula here has more toleranced inputs than this. */
const MOST_INPUTS = 10;
const MOST_RUNS = 1_000_000;
const STEP = 1e-4;

/**
 * @param tolerancesPercent by input name, 0 or more and below 100; inputs left out are taken as exact
 * @param options seed (any integer; the same seed gives the same band) and runs (1 to 1,000,000, 10,000 by default)
 * @throws FigureError as computeFigure, and `not-positive` for a tolerance out of range
 */
export function toleranceSpread(
  formulaId: FormulaId,
  values: FigureValues,
  tolerancesPercent: FigureValues,
  options: SpreadOptions = {},
): Spread {
  const formula = FORMULAS[formulaId];
  const nominalInput = inputsOf(formula, values);
  const tolerances = readTolerances(formulaId, tolerancesPercent);
  const nominal = formula.compute(nominalInput);
  const at = (offsets: ReadonlyMap<string, number>): number =>
    formula.compute((name) => nominalInput(name) * (1 + (offsets.get(name) ?? 0)));
  const shares = sharesOf(tolerances, nominal, at);
  const rss = Math.sqrt(shares.reduce((sum, share) => sum + share.percent ** 2, 0)) / 100;
  const { seed = 1, runs = 10_000 } = options;
  if (!Number.isInteger(runs) || runs < 1 || runs > MOST_RUNS)
    throw new FigureError('not-a-number', null, `Runs must be a whole number from 1 to ${MOST_RUNS}.`);
  return {
    nominal,
    worstCase: corners(tolerances, nominal, at),
    rootSumSquare: { low: nominal - Math.abs(nominal) * rss, high: nominal + Math.abs(nominal) * rss },
    monteCarlo: monteCarlo(formula.compute, nominalInput, tolerances, nominal, seed, runs),
    shares,
  };
}

interface Tolerance {
  readonly name: string;
  readonly fraction: number;
}

function readTolerances(formulaId: FormulaId, given: FigureValues): Tolerance[] {
  const names = FORMULAS[formulaId].inputs.map(({ name }) => name);
  const tolerances = Object.entries(given).map(([name, percent]) => {
    if (!names.includes(name))
      throw new FigureError('unknown-input', name, `A tolerance is given for "${name}", which the formula has not.`);
    if (!Number.isFinite(percent) || percent < 0 || percent >= 100)
      throw new FigureError(
        'not-positive',
        name,
        `The tolerance of ${name} must lie from 0 to below 100 %; it is ${percent}.`,
      );
    return { name, fraction: percent / 100 };
  });
  if (tolerances.length > MOST_INPUTS)
    throw new FigureError('contradiction', null, `More than ${MOST_INPUTS} toleranced parts are not spread.`);
  return tolerances.filter(({ fraction }) => fraction > 0);
}

function sharesOf(
  tolerances: readonly Tolerance[],
  nominal: number,
  at: (offsets: ReadonlyMap<string, number>) => number,
): Share[] {
  return tolerances
    .map(({ name, fraction }) => {
      const slope = (at(new Map([[name, STEP]])) - at(new Map([[name, -STEP]]))) / (2 * STEP * nominal);
      return { input: name, percentPerPercent: slope, percent: slope * fraction * 100 };
    })
    .sort((a, b) => Math.abs(b.percent) - Math.abs(a.percent));
}

/** Every figure here rises or falls steadily with each part, so the extremes lie at the corners. */
function corners(
  tolerances: readonly Tolerance[],
  nominal: number,
  at: (offsets: ReadonlyMap<string, number>) => number,
): Band {
  let [low, high] = [nominal, nominal];
  for (let corner = 0; corner < 2 ** tolerances.length; corner += 1) {
    const value = at(
      new Map(tolerances.map(({ name, fraction }, index) => [name, (corner >> index) & 1 ? fraction : -fraction])),
    );
    // Thresholds at their corners may cross; such a corner is no oscillator and says nothing of the band.
    if (!Number.isFinite(value)) continue;
    [low, high] = [Math.min(low, value), Math.max(high, value)];
  }
  return { low, high };
}

function monteCarlo(
  compute: (input: Inputs) => number,
  nominalInput: Inputs,
  tolerances: readonly Tolerance[],
  nominal: number,
  seed: number,
  runs: number,
): Spread['monteCarlo'] {
  const random = seededRandom(seed);
  const results = new Float64Array(runs);
  const drawn = new Map<string, number>();
  const input: Inputs = (name) => drawn.get(name) ?? nominalInput(name);
  let count = 0;
  for (let run = 0; run < runs; run += 1) {
    for (const { name, fraction } of tolerances)
      drawn.set(name, nominalInput(name) * (1 + fraction * (2 * random() - 1)));
    const value = compute(input);
    if (!Number.isFinite(value)) continue;
    results[count] = value;
    count += 1;
  }
  const kept = results.subarray(0, count).sort();
  const mean = kept.reduce((sum, value) => sum + value, 0) / count;
  const variance = kept.reduce((sum, value) => sum + (value - mean) ** 2, 0) / count;
  const quantile = (share: number): number => kept[Math.min(count - 1, Math.floor(share * count))] ?? nominal;
  return {
    low: quantile(0.005),
    high: quantile(0.995),
    mean,
    standardDeviationPercent: (Math.sqrt(variance) / Math.abs(nominal)) * 100,
    runs,
    seed,
  };
}

/** Mulberry32: 32 bits of state, the same numbers on every machine. Good for spreads, not for secrets. */
function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}
