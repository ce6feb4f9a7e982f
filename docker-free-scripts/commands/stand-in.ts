/**
 * Says whether one part may stand in for another: npm run -s stand-in -- --wanted TEXT --offered TEXT --rails "+12,-12"
 * --use timing [--kind capacitor] [--tolerance 5] [--mounting through-hole]; or a whole group against itself:
 * --matrix op-amp --rails "±12". Prints one JSON object; exit 0 whatever the verdict, 2 where a text can't be read.
 */
import { parseArgs } from 'node:util';
import { assess } from '@/lib/electronics/stand-in/assess';
import { USES, type StandInContext } from '@/lib/electronics/stand-in/check';
import { isMatrixGroup, MATRIX_GROUPS, matrixOf } from '@/lib/electronics/stand-in/matrix';
import { readRails } from '@/lib/electronics/stand-in/read-rails';
import { PART_KINDS, type Mounting, type PartKind, type PartSpec } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';

const MOUNTINGS: readonly Mounting[] = ['through-hole', 'surface', 'panel'];

function main(): void {
  const { values } = parseArgs({
    options: {
      wanted: { type: 'string' },
      offered: { type: 'string' },
      rails: { type: 'string' },
      use: { type: 'string' },
      kind: { type: 'string' },
      mounting: { type: 'string' },
      tolerance: { type: 'string' },
      matrix: { type: 'string' },
      json: { type: 'boolean', default: true },
    },
  });
  const context: StandInContext = {
    rails: values.rails === undefined ? [] : readRails(values.rails),
    use: oneOf(USES, values.use, '--use'),
    mounting: oneOf(MOUNTINGS, values.mounting, '--mounting'),
    lineTolerancePercent: percent(values.tolerance),
  };
  if (values.matrix !== undefined) {
    if (!isMatrixGroup(values.matrix))
      throw new Error(`--matrix is one of ${MATRIX_GROUPS.join(', ')}, not "${values.matrix}"`);
    print(matrixOf(values.matrix, context));
    return;
  }
  if (values.wanted === undefined || values.offered === undefined)
    throw new Error('say both: --wanted TEXT --offered TEXT');
  const kind = oneOf(PART_KINDS, values.kind, '--kind');
  print(assess(read(values.wanted, kind, '--wanted'), read(values.offered, kind, '--offered'), context));
}

function oneOf<T extends string>(allowed: readonly T[], text: string | undefined, option: string): T | null {
  if (text === undefined) return null;
  const found = allowed.find((name) => name === text);
  if (found === undefined) throw new Error(`${option} is one of ${allowed.join(', ')}, not "${text}"`);
  return found;
}

function percent(text: string | undefined): number | null {
  if (text === undefined) return null;
  const value = Number(text.replace('%', ''));
  if (!Number.isFinite(value) || value < 0) throw new Error(`--tolerance is a percentage, not "${text}"`);
  return value;
}

function read(text: string, kind: PartKind | null, option: string): PartSpec {
  const spec = readPartText(text, { kind });
  if (text.trim() === '' || (spec.value === null && spec.partNumber === null && spec.kind === null)) {
    throw new Error(`${option} "${text}" cannot be read as a part; --kind may help`);
  }
  return spec;
}

function print(value: unknown): void {
  console.log(JSON.stringify(value));
}

try {
  main();
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = 2;
}
