/**
 * One text about one part to what it says: `100n X7R 50V`, `TL072 or NJM4580`, `B50k lin`, `10u/25v`, `DNP`. The kind may
 * be given (a designator or a heading told it); otherwise the text must tell. What is not said stays null, and what can
 * be meant two ways becomes a doubt.
 */
import { doubtBetween } from './doubt-between';
import { findPartNumber, NUMBERED } from './find-part-number';
import { findValue } from './find-value';
import type { Dielectric, Doubt, PartKind, PartSpec, Quantity, Unit } from './part-spec';
import {
  DIELECTRIC_WORDS,
  ELSEWHERE,
  firstOf,
  KIND_WORDS,
  LEFT_OPEN,
  MOUNTING_WORDS,
  NOT_FITTED,
  NOT_FITTED_ALONE,
  OPTIONAL,
  PACKAGE_PATTERNS,
  TECHNOLOGY_WORDS,
  withoutMarks,
} from './part-words';
import { printQuantity } from './print-quantity';
import { type ReadQuantity, unitOfKind } from './read-quantity';
import { readRatings } from './read-ratings';
import { readTaper, type TaperConvention } from './read-taper';
import { rangeIn, splitAlternatives } from './split-alternatives';
import { tidyValueText } from './tidy-value-text';

export interface ReadOptions {
  readonly kind?: PartKind | null;
  /** How a bare taper letter is read; `ask` (the default) gives a doubt. */
  readonly taperConvention?: TaperConvention;
}

const LONGEST_TEXT = 500;

/** Never throws; a text of which nothing is understood has null in every field but `text`. */
export function readPartText(text: string, options: ReadOptions = {}): PartSpec {
  const tidy = withoutMarks(tidyValueText(text.slice(0, LONGEST_TEXT)));
  const fitted = !NOT_FITTED.test(tidy) && !NOT_FITTED_ALONE.test(tidy);
  const asked = tidy
    .replace(NOT_FITTED, ' ')
    .replace(OPTIONAL, ' ')
    .replace(/[([]\s*[)\]]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  const { main, others } = splitAlternatives(asked, options.kind ?? null);
  const number =
    NOT_FITTED_ALONE.test(tidy) || isValued(options.kind ?? null) ? null : findPartNumber(main, options.kind ?? null);
  const kindSaid = refinedKind(options.kind ?? null, main, number?.family?.kind ?? null);
  const packaging = packageIn(main);
  const ratings = readRatings(
    withoutNames(main, [packaging?.found, number?.family ? number.partNumber : undefined], kindSaid),
  );
  const taper = readTaper(ratings.rest, options.taperConvention ?? 'ask', kindSaid);
  const kindKnown = kindSaid ?? (taper.taper === null ? null : 'potentiometer');
  const dielectric = firstOf(DIELECTRIC_WORDS, main);
  const technology = firstOf(TECHNOLOGY_WORDS, main);
  const value =
    (number?.family ?? null) === null ? valueOf(taper.rest, kindKnown, dielectric, ratings.ratedVolts) : null;
  const kind =
    kindKnown ??
    kindOfUnit(value?.quantity.unit ?? null) ??
    (dielectric === null || technology !== null ? null : 'capacitor');
  const range = kind === null ? null : rangeIn(asked, kind);
  const conflict = conflictIn(kind, value, main);
  const finalKind = conflict?.kind ?? kind;
  const read = range?.low ?? value?.quantity ?? null;
  const doubts = [
    ...(range === null
      ? (conflict?.doubt ?? value?.doubts ?? [])
      : [doubtBetween('either-of', text.trim(), 'Either will do, so which one goes in?', [range.low, range.high])]),
    ...(isPotLike(finalKind) && taper.doubt !== null ? [taper.doubt] : []),
    ...remarkDoubts(tidy, text.trim(), read, number?.partNumber ?? null),
  ];
  return {
    kind: finalKind,
    value: read,
    tolerancePercent: ratings.tolerancePercent ?? value?.tolerancePercent ?? null,
    ratedVolts: ratings.ratedVolts,
    ratedWatts: ratings.ratedWatts,
    ratedAmperes: ratings.ratedAmperes,
    dielectric: finalKind === 'capacitor' ? (dielectric ?? unpolarised(main, read)) : null,
    technology: finalKind === 'resistor' ? technology : null,
    taper: isPotLike(finalKind) ? taper.taper : null,
    mounting: packaging?.mounting ?? firstOf(MOUNTING_WORDS, main),
    package: packaging?.name ?? null,
    partNumber:
      value !== null && (number?.family ?? null) === null && (finalKind === null || unitOfKind(finalKind) !== null)
        ? null
        : (number?.partNumber ?? null),
    family: number?.family?.familyId ?? null,
    alternatives: range === null ? others : [range.highText, ...others.filter((other) => other !== range.highText)],
    fitted,
    doubts: fitted ? doubts : [],
    text,
  };
}

function isPotLike(kind: PartKind | null): boolean {
  return kind === 'potentiometer' || kind === 'trimmer';
}

/** Kinds that are asked for by value alone; a number on them is looked for only where the text names no value. */
function isValued(kind: PartKind | null): boolean {
  return (
    kind === 'resistor' ||
    kind === 'capacitor' ||
    kind === 'potentiometer' ||
    kind === 'trimmer' ||
    kind === 'thermistor'
  );
}

/** Words may narrow what a designator said: D1 may be an LED, R5 a trimmer or thermistor, U3 a regulator or optocoupler. */
function refinedKind(given: PartKind | null, text: string, family: PartKind | null): PartKind | null {
  const word = firstOf(KIND_WORDS, text);
  if (given === null) return family ?? word;
  if (family !== null && NUMBERED.includes(given)) return family;
  if (given === 'diode' && family === null && word === 'led') return 'led';
  if (given === 'resistor' && (word === 'trimmer' || word === 'potentiometer' || word === 'thermistor')) return word;
  if (given === 'potentiometer' && word === 'trimmer') return word;
  if (given === 'ic' && family === null && (word === 'regulator' || word === 'optocoupler')) return word;
  return given;
}

/**
 * Takes away the case and the part number, whose digits are no ratings (`LM4040-10V`), and gives the second figure of
 * `47/16` on a capacitor its volts.
 */
function withoutNames(text: string, names: readonly (string | undefined)[], kind: PartKind | null): string {
  const bare = names.reduce<string>((left, name) => (name === undefined ? left : left.replace(name, ' ')), text);
  return kind === 'capacitor' ? bare.replace(/^(\d+(?:[.,]\d+)?)\s?\/\s?(\d{1,3})\s?v?$/i, '$1 $2V') : bare;
}

function packageIn(text: string): { name: string; found: string; mounting: PartSpec['mounting'] } | null {
  // 1210 alone is ohms; 0805 alone is a case, since no value starts with 0.
  if (/^[1-9]\d*$/.test(text)) return null;
  for (const [pattern, name, mounting] of PACKAGE_PATTERNS) {
    const match = pattern.exec(text);
    if (match) return { name: name(match), found: match[0], mounting };
  }
  return null;
}

/** Polarised capacitors are always listed in microfarads, and `47/16` on one is 47 µF for 16 V. */
function valueOf(
  text: string,
  kind: PartKind | null,
  dielectric: Dielectric | null,
  ratedVolts: number | null,
): ReadQuantity | null {
  const read = findValue(text, kind);
  if (kind !== 'capacitor' || read === null || read.doubts[0]?.code !== 'bare-capacitance') return read;
  const polarised =
    dielectric === 'aluminium' ||
    dielectric === 'tantalum' ||
    dielectric === 'aluminium-bipolar' ||
    dielectric === 'polymer';
  const number = /^\s*(\d+(?:[.,]\d+)?)/.exec(text)?.[1];
  const micro = number === undefined || !(polarised || ratedVolts !== null) ? null : findValue(`${number}uF`, kind);
  if (micro === null) return read;
  if (polarised) return micro;
  return {
    ...micro,
    doubts: [
      doubtBetween('bare-capacitance', text.trim(), 'No unit: microfarad, as with the voltage beside it?', [
        micro.quantity,
        read.quantity,
      ]),
    ],
  };
}

/** NP and BP on large values are electrolytics without polarity; on small ones NP is no more than a remark. */
function unpolarised(text: string, value: Quantity | null): Dielectric | null {
  const large = value !== null && value.unit === 'farad' && value.significand * 10 ** value.exponent >= 4.7e-7;
  return large && /\b(?:NP|BP|non[- ]?pol\w*|unpol\w*)\b/i.test(text) ? 'aluminium-bipolar' : null;
}

function kindOfUnit(unit: Unit | null): PartKind | null {
  switch (unit) {
    case 'ohm':
      return 'resistor';
    case 'farad':
      return 'capacitor';
    case 'henry':
      return 'inductor';
    case 'hertz':
      return 'crystal';
    default:
      return null;
  }
}

/**
 * `100nF` on a line of resistors: the value stays as said, and the builder is asked. A word beside the value (`capacitor
 * 100 nF`) settles it. Ohms on an inductor are a ferrite bead's impedance and no conflict.
 */
function conflictIn(
  kind: PartKind | null,
  value: ReadQuantity | null,
  text: string,
): { kind: PartKind; doubt: readonly Doubt[] } | null {
  const home = unitOfKind(kind);
  if (kind === null || value === null || home === null || value.quantity.unit === home) return null;
  if (kind === 'inductor' && value.quantity.unit === 'ohm') return null;
  const other = kindOfUnit(value.quantity.unit);
  if (other === null) return null;
  if (firstOf(KIND_WORDS, text) === other) return { kind: other, doubt: [] };
  const shown = printQuantity(value.quantity);
  const ask = `${shown} is the value of ${article(other)}, but this line is for ${article(kind)}. Which is it?`;
  return { kind, doubt: [{ code: 'kind-conflict', ask, options: [`${other} ${shown}`] }] };
}

function article(kind: PartKind): string {
  return /^[aeiou]/.test(kind) ? `an ${kind}` : `a ${kind}`;
}

function remarkDoubts(tidy: string, text: string, value: Quantity | null, partNumber: string | null): Doubt[] {
  const said = value === null ? partNumber : printQuantity(value);
  const doubts: Doubt[] = [];
  if (OPTIONAL.test(tidy)) {
    doubts.push({
      code: 'optional-part',
      ask: `“${text}”: does it go in, or stay empty?`,
      options: [...(said === null ? [] : [said]), 'not fitted'],
    });
  }
  if (LEFT_OPEN.test(tidy) || (said === null && ELSEWHERE.test(tidy))) {
    doubts.push({
      code: 'left-open',
      ask: `“${text}” leaves it open. What goes in?`,
      options: [...(said === null ? [] : [said]), 'not fitted'],
    });
  }
  return doubts;
}
