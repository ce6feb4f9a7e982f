/** One finding about a stand-in, and how findings become a verdict. */
import type { Basis, Fact } from '../families/family';
import type { Mounting } from '../part-spec';

export type Outcome = 'pass' | 'note' | 'fail' | 'unknown';
export type Verdict = 'same' | 'drop-in' | 'with-effect' | 'ask' | 'refused';
export const USES = ['timing', 'audio', 'control', 'decoupling', 'logic', 'power', 'safety'] as const;
export type Use = (typeof USES)[number];

export interface Check {
  /** What was looked at, such as `schmitt-inputs` or `lead-order`. */
  readonly check: string;
  readonly wanted: string;
  readonly offered: string;
  readonly outcome: Outcome;
  /** One sentence a builder would say. */
  readonly why: string;
  /** For notes: a figure moves, or a hand is needed (turn it round, read the datasheet). A harmless note has false. */
  readonly changes: boolean;
}

export interface StandInContext {
  /** Signed volts of the circuit's rails, such as [12, -12]; empty where not known. */
  readonly rails: readonly number[];
  readonly use: Use | null;
  readonly mounting?: Mounting | null;
  /** What the line's value may be off by, in percent; the wanted part's own tolerance stands in where missing. */
  readonly lineTolerancePercent?: number | null;
}

export interface Assessment {
  readonly verdict: Verdict;
  readonly checks: readonly Check[];
}

/**
 * The only place where findings become a verdict: any `fail` refuses; otherwise any `unknown` asks a person; otherwise a
 * note that moves a figure or needs a hand makes it `with-effect`; what remains, harmless notes included, is `drop-in`.
 * `same` is given before any check, to the identical part only.
 */
export function verdictOf(checks: readonly Check[]): Verdict {
  if (checks.length === 0 || checks.some((check) => check.outcome === 'fail'))
    return checks.length === 0 ? 'ask' : 'refused';
  if (checks.some((check) => check.outcome === 'unknown')) return 'ask';
  return checks.some((check) => check.outcome === 'note' && check.changes) ? 'with-effect' : 'drop-in';
}

type Words = readonly [check: string, wanted: string, offered: string, why: string];

export function pass(...[check, wanted, offered, why]: Words): Check {
  return { check, wanted, offered, outcome: 'pass', why, changes: false };
}

/** Worth saying, nothing to do. */
export function remark(...[check, wanted, offered, why]: Words): Check {
  return { check, wanted, offered, outcome: 'note', why, changes: false };
}

/** Fits, but a figure moves or a hand is needed. */
export function effect(...[check, wanted, offered, why]: Words): Check {
  return { check, wanted, offered, outcome: 'note', why, changes: true };
}

export function fail(...[check, wanted, offered, why]: Words): Check {
  return { check, wanted, offered, outcome: 'fail', why, changes: true };
}

export function unknown(...[check, wanted, offered, why]: Words): Check {
  return { check, wanted, offered, outcome: 'unknown', why, changes: true };
}

/** A fact from memory may not refuse or approve alone: its fail becomes a question, its pass a note to look it up. */
export function weighed(check: Check, ...facts: readonly (Fact<unknown> | null)[]): Check {
  const bases: readonly Basis[] = facts.flatMap((fact) => (fact === null ? [] : [fact.basis]));
  if (!bases.includes('memory')) return check;
  const why = `${check.why.replace(/\.$/, '')}; this is from memory, so look it up in the datasheet.`;
  if (check.outcome === 'fail') return { ...check, outcome: 'unknown', why };
  if (check.outcome === 'pass') return { ...check, outcome: 'note', changes: true, why };
  return { ...check, why };
}

/** Volts, amperes and the like without a tail of zeros: 36 V, 0.005 V. */
export function measure(value: number, unit: string): string {
  return `${Number(value.toPrecision(3))} ${unit}`;
}

export function spanOf(rails: readonly number[]): number | null {
  if (rails.length === 0) return null;
  return Math.max(0, ...rails) - Math.min(0, ...rails);
}

export function highestRail(rails: readonly number[]): number | null {
  return rails.length === 0 ? null : Math.max(...rails.map(Math.abs));
}
