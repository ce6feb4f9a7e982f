/**
 * Computes a figure from its parts: npm run -s effect -- --formula schmitt-rc --vdd 5 --vt-up 2.9 --vt-down 1.9 --r 22k
 * --c 100p [--r-tolerance 1] [--seed 7]. Prints one JSON object; exit 2 with a sentence where it can't.
 */
import { parseArgs } from 'node:util';
import { computeFigure } from '@/lib/electronics/effects/compute-figure';
import {
  FORMULA_IDS,
  FORMULAS,
  isFormulaId,
  type FormulaInput,
  type InputUnit,
} from '@/lib/electronics/effects/formulas';
import { toleranceSpread } from '@/lib/electronics/effects/tolerance-spread';
import type { PartKind } from '@/lib/electronics/part-spec';
import { toNumber } from '@/lib/electronics/quantity';
import { readQuantity } from '@/lib/electronics/read-quantity';

const TOLERANCE = '-tolerance';
const KIND_OF_UNIT: Readonly<Partial<Record<InputUnit, PartKind>>> = {
  ohm: 'resistor',
  farad: 'capacitor',
  henry: 'inductor',
};

function main(): void {
  const given = options();
  const formulaId = given.get('formula') ?? '';
  if (!isFormulaId(formulaId)) throw new Error(`--formula is one of ${FORMULA_IDS.join(', ')}, not "${formulaId}"`);
  const formula = FORMULAS[formulaId];
  const values: Record<string, number> = {};
  const tolerances: Record<string, number> = {};
  for (const [name, text] of given) {
    if (name === 'formula' || name === 'seed') continue;
    const plain = name.endsWith(TOLERANCE) ? name.slice(0, -TOLERANCE.length) : name;
    const input = formula.inputs.find((one) => one.name === plain);
    if (input === undefined)
      throw new Error(
        `the ${formula.title} has no input --${name}; it takes ${formula.inputs.map((one) => `--${one.name}`).join(', ')}`,
      );
    if (plain === name) values[name] = readInput(input, text);
    else tolerances[plain] = plainNumber(name, text.replace('%', ''));
  }
  const figure = computeFigure(formulaId, values);
  const seed = given.get('seed');
  const spread =
    Object.keys(tolerances).length === 0
      ? {}
      : {
          spread: toleranceSpread(
            formulaId,
            values,
            tolerances,
            seed === undefined ? {} : { seed: plainNumber('seed', seed) },
          ),
        };
  console.log(JSON.stringify({ ...figure, inputs: values, ...spread }));
}

/** Names of inputs differ by formula, so options are taken as they come, each once and each with a value. */
function options(): Map<string, string> {
  const { tokens } = parseArgs({ strict: false, tokens: true, args: process.argv.slice(2).flatMap(joinValue) });
  const given = new Map<string, string>();
  for (const token of tokens) {
    if (token.kind !== 'option') throw new Error(`"${token.kind === 'positional' ? token.value : '--'}" is no option`);
    if (token.value === undefined) throw new Error(`${token.rawName} has no value`);
    if (given.has(token.name)) throw new Error(`${token.rawName} is given twice`);
    given.set(token.name, token.value);
  }
  return given;
}

/** `--r 22k` as `--r=22k`, since unknown options take no separate value otherwise. */
function joinValue(argument: string, index: number, all: readonly string[]): string[] {
  const isName = (text: string | undefined): boolean => text?.startsWith('--') === true;
  if (isName(argument)) {
    const next = all[index + 1];
    return argument.includes('=') || next === undefined || isName(next) ? [argument] : [`${argument}=${next}`];
  }
  const before = all[index - 1];
  return isName(before) && before?.includes('=') === false ? [] : [argument];
}

function readInput(input: FormulaInput, text: string): number {
  const kind = KIND_OF_UNIT[input.unit];
  if (kind === undefined) return plainNumber(input.name, text.replace(/\s*(?:V|°?C)$/i, ''));
  // Zero and negative values go on to the formula, whose sentence says what is wrong with them.
  if (/^-?\d+(?:\.\d+)?(?:e[+-]?\d+)?$/i.test(text)) return Number(text);
  const read = readQuantity(text, kind);
  if (read === null || read.doubts.length > 0)
    throw new Error(
      `--${input.name} "${text}" cannot be read as a value in ${input.unit}${read?.doubts[0] === undefined ? '' : `: ${read.doubts[0].ask}`}`,
    );
  return toNumber(read.quantity);
}

function plainNumber(name: string, text: string): number {
  const value = Number(text);
  if (text.trim() === '' || !Number.isFinite(value)) throw new Error(`--${name} "${text}" is no number`);
  return value;
}

try {
  main();
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = 2;
}
