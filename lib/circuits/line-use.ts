/** What a part does in the circuit, where the list says so: `2n2 C0G, timing`. Pure. */
import type { Use } from '@/lib/electronics/stand-in/check';

const WORDS: readonly (readonly [RegExp, Use])[] = [
  [/\b(?:timing|tempo|clock|oscillator|vco)\b/i, 'timing'],
  [/\b(?:decoupling|bypass|supply filter)\b/i, 'decoupling'],
  [/\b(?:audio|signal path)\b/i, 'audio'],
  [/\b(?:cv|control voltage)\b/i, 'control'],
  [/\bmains\b/i, 'safety'],
];

/** @returns the use that the text names, or null where it names none or several */
export function circuitUseIn(text: string): Use | null {
  const named = new Set(WORDS.filter(([pattern]) => pattern.test(text)).map(([, use]) => use));
  const [only] = named;
  return named.size === 1 && only !== undefined ? only : null;
}
