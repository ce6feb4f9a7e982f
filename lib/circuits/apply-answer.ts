/** What an answered question makes of its line. Pure; the answer is one of the options or the person's own text. */
import type { PartSpec, Taper } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';
import { MOST_QUANTITY } from './line-draft';

export interface AnsweredLine {
  readonly quantity: number;
  readonly spec: PartSpec;
  /** False where the answer says that the row is no part at all. */
  readonly isPart: boolean;
}

export type AnswerProblem = { readonly ok: false; readonly why: string };

const TAPERS: Readonly<Record<string, Taper>> = {
  linear: 'linear',
  lin: 'linear',
  logarithmic: 'log',
  log: 'log',
  audio: 'log',
  'reverse log': 'reverse-log',
  'reverse-log': 'reverse-log',
  'reverse logarithmic': 'reverse-log',
};
const NO_PART = /^(?:no|not|none|it is no) (?:a )?part\b|^leave it out$|^no part$/i;
const NOT_FITTED = /^(?:not fitted|leave (?:it )?open|omit)$/i;

/**
 * @param code the question's code; those about a quantity take a whole number, those about a taper its name, all others
 *   a text that is read as the part (`2.2 MΩ`, `NJM4580`), keeping what else was understood
 */
export function applyAnswer(
  line: { readonly quantity: number; readonly spec: PartSpec },
  code: string,
  answer: string,
): { ok: true; line: AnsweredLine } | AnswerProblem {
  const text = answer.normalize('NFKC').trim();
  const settled = withoutDoubt(line.spec, code);
  if (NO_PART.test(text)) return { ok: true, line: { ...line, spec: settled, isPart: false } };
  if (NOT_FITTED.test(text))
    return { ok: true, line: { ...line, spec: { ...settled, fitted: false, doubts: [] }, isPart: true } };
  if (code.includes('quantity')) return withQuantity(line.quantity, settled, text);
  if (code.includes('taper')) {
    const taper = TAPERS[text.toLowerCase()];
    return taper === undefined
      ? { ok: false, why: 'A taper is linear, logarithmic or reverse log.' }
      : { ok: true, line: { quantity: line.quantity, spec: { ...settled, taper }, isPart: true } };
  }
  if (code.includes('fitted'))
    return {
      ok: true,
      line: { quantity: line.quantity, spec: { ...settled, fitted: /^(?:yes|fitted)/i.test(text) }, isPart: true },
    };
  return withText(line.quantity, settled, text);
}

function withoutDoubt(spec: PartSpec, code: string): PartSpec {
  return { ...spec, doubts: spec.doubts.filter((doubt) => doubt.code !== code) };
}

function withQuantity(before: number, spec: PartSpec, text: string): { ok: true; line: AnsweredLine } | AnswerProblem {
  const digits = /^(\d{1,7})\b/.exec(text)?.[1];
  const quantity = digits === undefined ? Number.NaN : Number(digits);
  if (!Number.isInteger(quantity) || quantity > MOST_QUANTITY)
    return { ok: false, why: `A quantity is a whole number up to ${MOST_QUANTITY}, such as ${before || 1}.` };
  return { ok: true, line: { quantity, spec, isPart: true } };
}

function withText(quantity: number, spec: PartSpec, text: string): { ok: true; line: AnsweredLine } | AnswerProblem {
  const read = readPartText(text, { kind: spec.kind, taperConvention: 'letters' });
  const [doubt] = read.doubts;
  if (doubt) return { ok: false, why: doubt.ask };
  const says = read.value !== null || read.partNumber !== null || read.family !== null;
  const merged: PartSpec = {
    ...spec,
    kind: spec.kind ?? read.kind,
    value: read.value ?? (read.partNumber === null ? spec.value : null),
    tolerancePercent: read.tolerancePercent ?? spec.tolerancePercent,
    ratedVolts: read.ratedVolts ?? spec.ratedVolts,
    ratedWatts: read.ratedWatts ?? spec.ratedWatts,
    ratedAmperes: read.ratedAmperes ?? spec.ratedAmperes,
    dielectric: read.dielectric ?? spec.dielectric,
    technology: read.technology ?? spec.technology,
    taper: read.taper ?? spec.taper,
    mounting: read.mounting ?? spec.mounting,
    package: read.package ?? spec.package,
    partNumber: read.partNumber ?? (read.value === null ? spec.partNumber : null),
    family: read.family ?? (read.partNumber === null && read.value === null ? spec.family : null),
    text: says ? spec.text : text,
  };
  return { ok: true, line: { quantity, spec: merged, isPart: true } };
}
