/**
 * Checks that imports run one way (.dependency-cruiser.mjs). Also that modules were read at all: with a TypeScript that
 * dependency-cruiser doesn't know it reads none and finds nothing wrong. Exit status 1 with one line for each wrong import.
 */
import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { cruise, type ICruiseOptions, type ICruiseResult } from 'dependency-cruiser';
import extractTypeScriptConfig from 'dependency-cruiser/config-utl/extract-ts-config';
import config from '../../.dependency-cruiser.mjs';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const FOLDERS = ['app', 'components', 'lib', 'db', 'docker-free-scripts', 'tests'];

const sourceFiles = FOLDERS.flatMap((folder) =>
  readdirSync(`${ROOT}/${folder}`, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name) && !name.endsWith('.d.ts'))
    .map((name) => `${folder}/${name}`),
);

function isResult(output: ICruiseResult | string): output is ICruiseResult {
  return typeof output !== 'string';
}

process.chdir(ROOT);
const options: ICruiseOptions = { ...config.options, validate: true, ruleSet: { forbidden: config.forbidden } };
const { output } = await cruise(FOLDERS, options, undefined, { tsConfig: extractTypeScriptConfig('tsconfig.json') });
if (!isResult(output)) throw new Error('dependency-cruiser answered with text where a result was asked for');

const read = new Set(output.modules.map((module) => module.source));
const unread = sourceFiles.filter((file) => !read.has(file));
const violations = output.summary.violations.filter((violation) => violation.rule.severity === 'error');
for (const violation of violations) {
  const way = violation.cycle ? violation.cycle.map((step) => step.name).join(' → ') : violation.to;
  console.error(`${violation.rule.name}: ${violation.from} → ${way}`);
}
if (sourceFiles.length === 0 || unread.length > 0) {
  console.error(
    `not read by dependency-cruiser: ${unread.length} of ${sourceFiles.length} source files, such as ${unread.slice(0, 3).join(', ')}`,
  );
}
console.log(
  `${sourceFiles.length - unread.length} modules, ${output.summary.totalDependenciesCruised} imports, ${violations.length} of them the wrong way`,
);
process.exitCode = violations.length > 0 || unread.length > 0 || sourceFiles.length === 0 ? 1 : 0;
