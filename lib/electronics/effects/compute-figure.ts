/** Computes a circuit's figure from the values of its parts. */
import { FORMULAS, type FigureKind, type Formula, type FormulaId, type Inputs } from './formulas';

export type FigureProblem = 'missing-input' | 'unknown-input' | 'not-positive' | 'not-a-number' | 'contradiction';

export class FigureError extends Error {
  override readonly name = 'FigureError';
  constructor(
    readonly problem: FigureProblem,
    /** The input at fault, or null where several contradict each other. */
    readonly input: string | null,
    message: string,
  ) {
    super(message);
  }
}

export interface Figure {
  readonly formula: FormulaId;
  readonly kind: FigureKind;
  readonly value: number;
  readonly unit: Formula['unit'];
}

/** Values in base units: ohm, farad, henry, volt, degree Celsius. */
export type FigureValues = Readonly<Record<string, number>>;

const ABSOLUTE_ZERO_CELSIUS = -273.15;

/**
 * @param values by input name, in base units, each positive (a temperature above absolute zero)
 * @returns hertz, volts, seconds or a plain ratio, as the formula says
 * @throws FigureError where an input is missing, unknown, zero, negative or no number, or thresholds contradict each other
 */
export function computeFigure(formulaId: FormulaId, values: FigureValues): Figure {
  const formula = FORMULAS[formulaId];
  const input = inputsOf(formula, values);
  return { formula: formulaId, kind: formula.kind, value: formula.compute(input), unit: formula.unit };
}

/** The checked reader of inputs that formulas compute from; the same errors as computeFigure. */
export function inputsOf(formula: Formula, values: FigureValues): Inputs {
  const known = new Map<string, number>();
  for (const { name, unit, says, fallback } of formula.inputs) {
    const value = values[name] ?? fallback;
    if (value === undefined)
      throw new FigureError('missing-input', name, `The ${formula.title} needs ${says} (${name}).`);
    if (!Number.isFinite(value))
      throw new FigureError('not-a-number', name, `The value of ${says} (${name}) is no number.`);
    const lowest = unit === 'celsius' ? ABSOLUTE_ZERO_CELSIUS : 0;
    if (value <= lowest)
      throw new FigureError(
        'not-positive',
        name,
        `The value of ${says} (${name}) must be more than ${lowest}; it is ${value}.`,
      );
    known.set(name, value);
  }
  const stray = Object.keys(values).find((name) => !known.has(name));
  if (stray !== undefined) {
    throw new FigureError(
      'unknown-input',
      stray,
      `The ${formula.title} has no input "${stray}"; it takes ${formula.inputs.map(({ name }) => name).join(', ')}.`,
    );
  }
  const input: Inputs = (name) => known.get(name) ?? Number.NaN;
  const contradiction = formula.refuse?.(input) ?? null;
  if (contradiction !== null)
    throw new FigureError('contradiction', null, `The ${formula.title} cannot be computed: ${contradiction}.`);
  return input;
}
