/**
 * wait-for.ts URL SECONDS [PIDFILE…]: waits until URL answers 200. Exit status 1, with one line on standard error that
 * says why, when the time is over or a process named by a pid file is gone.
 */
import { existsSync, readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

const BETWEEN_TRIES_MS = 150;
const ONE_TRY_MS = 5_000;

function isAlive(pidFile: string): boolean {
  try {
    process.kill(Number(readFileSync(pidFile, 'utf8').trim()), 0);
    return true;
  } catch {
    return existsSync(pidFile) === false;
  }
}

async function problemOf(url: string): Promise<string | null> {
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(ONE_TRY_MS), redirect: 'manual' });
    const text = (await response.text()).slice(0, 200);
    return response.status === 200 ? null : `answered ${response.status} ${text}`;
  } catch (error) {
    const cause = error instanceof Error && error.cause instanceof Error ? error.cause.message : '';
    return `did not answer (${cause || (error instanceof Error ? error.message : String(error))})`;
  }
}

async function waitFor(url: string, limitMs: number, pidFiles: readonly string[]): Promise<string | null> {
  const end = Date.now() + limitMs;
  for (;;) {
    const problem = await problemOf(url);
    if (problem === null) return null;
    const gone = pidFiles.find((file) => !isAlive(file));
    if (gone) return `${gone} names a process that is gone`;
    if (Date.now() >= end) return `${url} ${problem}, for ${limitMs / 1000} s`;
    await pause(BETWEEN_TRIES_MS);
  }
}

const [url, seconds, ...pidFiles] = process.argv.slice(2);
if (!url || !(Number(seconds) > 0)) {
  console.error('usage: wait-for.ts URL SECONDS [PIDFILE…]');
  process.exitCode = 2;
} else {
  const problem = await waitFor(url, Number(seconds) * 1000, pidFiles);
  if (problem) {
    console.error(problem);
    process.exitCode = 1;
  }
}
