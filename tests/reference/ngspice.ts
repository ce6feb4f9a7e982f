/** Runs Debian's ngspice in batch mode on a circuit and reads its measurements. */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const NGSPICE = '/usr/bin/ngspice';
const LONGEST_RUN_MS = 60_000;

/**
 * @returns every `name = number` that a `.meas` or `meas` line printed, names in lower case
 * @throws Error where ngspice is not installed or fails: a missing reference is a failed test, not a skipped one
 */
export function simulate(circuit: string): ReadonlyMap<string, number> {
  if (!existsSync(NGSPICE)) throw new Error(`${NGSPICE} is missing: install Debian's ngspice`);
  const directory = mkdtempSync(join(tmpdir(), 'ngspice-'));
  try {
    const file = join(directory, 'circuit.cir');
    writeFileSync(file, circuit);
    const run = spawnSync(NGSPICE, ['-b', file], { cwd: directory, encoding: 'utf8', timeout: LONGEST_RUN_MS });
    if (run.error !== undefined) throw run.error;
    const results = new Map<string, number>();
    for (const [, name = '', value = ''] of run.stdout.matchAll(
      /^\s*(\w+)\s*=\s*([-+]?\d+(?:\.\d+)?(?:e[-+]?\d+)?)/gim,
    ))
      results.set(name.toLowerCase(), Number(value));
    if (results.size === 0) throw new Error(`ngspice measured nothing:\n${run.stdout}\n${run.stderr}`);
    return results;
  } finally {
    rmSync(directory, { recursive: true, force: true });
  }
}

export function measured(results: ReadonlyMap<string, number>, name: string): number {
  const value = results.get(name);
  if (value === undefined)
    throw new Error(`ngspice did not measure ${name}; it measured ${[...results.keys()].join(', ')}`);
  return value;
}
