/**
 * run-tests.ts run PROJECT SECONDS FOLDER   runs one vitest project and adds its counts to FOLDER/results.jsonl
 * run-tests.ts sum FOLDER                   prints what failed, then "N passed, N failed"; exit status 1 if any did
 * A file that doesn't load, a hook that fails, a skipped test, an error outside any test and a run over its limit each
 * count as failures: none of them guards anything.
 */
import { spawn } from 'node:child_process';
import { appendFileSync, existsSync, openSync, readFileSync, rmSync } from 'node:fs';
import { relative } from 'node:path';
import { z } from 'zod';

const report = z.object({
  success: z.boolean(),
  testResults: z.array(
    z.object({
      name: z.string(),
      status: z.string(),
      message: z.string().optional(),
      assertionResults: z.array(
        z.object({ fullName: z.string(), status: z.string(), failureMessages: z.array(z.string()).nullish() }),
      ),
    }),
  ),
});
const resultLine = z.object({
  part: z.string(),
  passed: z.number(),
  failed: z.number(),
  failures: z.array(z.string()).default([]),
});
type Result = z.output<typeof resultLine>;

const firstLines = (text: string) =>
  text
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.includes('node_modules'))
    .slice(0, 8)
    .join('\n');

function countReport(part: string, text: string, exitStatus: number | null): Result {
  const { testResults, success } = report.parse(JSON.parse(text));
  const result: Result = { part, passed: 0, failed: 0, failures: [] };
  const fail = (what: string, why: string) => {
    result.failed += 1;
    result.failures.push(`${what}\n${firstLines(why)}`);
  };
  for (const file of testResults) {
    const name = relative(process.cwd(), file.name);
    const failedBefore = result.failed;
    for (const test of file.assertionResults) {
      if (test.status === 'passed') result.passed += 1;
      else if (test.status === 'failed') fail(`${name} › ${test.fullName}`, test.failureMessages?.[0] ?? '');
    }
    if (file.status === 'failed' && result.failed === failedBefore)
      fail(name, file.message ?? 'the file failed outside its tests');
    for (const test of file.assertionResults) {
      if (test.status !== 'passed' && test.status !== 'failed')
        fail(`${name} › ${test.fullName}`, `not run (${test.status})`);
    }
  }
  if (result.passed + result.failed === 0) fail(part, 'vitest ran no test');
  if (result.failed === 0 && (!success || exitStatus !== 0))
    fail(part, `vitest ended with status ${exitStatus}: an error outside the tests, see the log`);
  return result;
}

async function runProject(part: string, limitSeconds: number, folder: string): Promise<Result> {
  const reportFile = `${folder}/${part}.json`;
  const logFile = `${folder}/${part}.log`;
  rmSync(reportFile, { force: true });
  const log = openSync(logFile, 'w');
  const vitest = spawn(
    process.execPath,
    [
      'node_modules/vitest/vitest.mjs',
      'run',
      '--project',
      part,
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${reportFile}`,
    ],
    { stdio: ['ignore', log, log], env: { ...process.env, NO_COLOR: '1' } },
  );
  let isOverLimit = false;
  const limit = setTimeout(() => {
    isOverLimit = true;
    vitest.kill('SIGKILL');
  }, limitSeconds * 1000);
  const exitStatus = await new Promise<number | null>((resolve) => vitest.once('exit', resolve));
  clearTimeout(limit);
  if (isOverLimit || !existsSync(reportFile)) {
    const why = isOverLimit
      ? `stopped after its limit of ${limitSeconds} s`
      : `vitest ended with status ${exitStatus} and no report`;
    const tail = readFileSync(logFile, 'utf8').split('\n').slice(-15).join('\n');
    return { part, passed: 0, failed: 1, failures: [`${part}: ${why}\n${tail}`] };
  }
  return countReport(part, readFileSync(reportFile, 'utf8'), exitStatus);
}

function readResults(folder: string): Result[] {
  return readFileSync(`${folder}/results.jsonl`, 'utf8')
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => resultLine.parse(JSON.parse(line)));
}

const indent = (text: string) =>
  text
    .split('\n')
    .map((line) => `        | ${line.slice(0, 240)}`)
    .join('\n');

const [verb, ...rest] = process.argv.slice(2);
if (verb === 'run') {
  const [part, seconds, folder] = rest;
  if (!part || !folder) throw new Error('usage: run-tests.ts run PROJECT SECONDS FOLDER');
  const began = Date.now();
  const result = await runProject(part, Number(seconds), folder);
  appendFileSync(`${folder}/results.jsonl`, `${JSON.stringify(result)}\n`);
  const time = `${Math.round((Date.now() - began) / 1000)} s`;
  console.log(
    `${result.failed === 0 ? 'ok     ' : 'FAILED '} ${part}: ${result.passed} passed, ${result.failed} failed (${time})`,
  );
  for (const failure of result.failures.slice(0, 20)) console.log(indent(failure));
  if (result.failures.length > 20) console.log(indent(`and ${result.failures.length - 20} more`));
} else if (verb === 'sum') {
  const [folder] = rest;
  if (!folder) throw new Error('usage: run-tests.ts sum FOLDER');
  const results = readResults(folder);
  const passed = results.reduce((sum, result) => sum + result.passed, 0);
  const failed = results.reduce((sum, result) => sum + result.failed, 0);
  if (failed > 0) {
    console.log('\nWhat failed:');
    for (const result of results) {
      if (result.failed > 0 && result.failures.length === 0) console.log(`  ${result.part}`);
      for (const failure of result.failures) console.log(`  ${failure.split('\n')[0]}`);
    }
  }
  console.log(`${passed} passed, ${failed} failed`);
  process.exitCode = failed > 0 || passed === 0 ? 1 : 0;
} else {
  throw new Error('usage: run-tests.ts run PROJECT SECONDS FOLDER | sum FOLDER');
}
