/** One question between readings of a value, with each reading printed so that it reads back without a doubt. */
import type { Doubt, Quantity } from './part-spec';
import { printQuantity } from './print-quantity';

/** @param question a sentence without the text itself; the likeliest reading stands first in `options` */
export function doubtBetween(code: string, text: string, question: string, options: readonly Quantity[]): Doubt {
  return { code, ask: `“${text}”: ${question}`, options: [...new Set(options.map(printQuantity))] };
}
