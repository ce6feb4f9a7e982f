/**
 * What may stand behind a number (`k`, `uF`, `kOhm`, `Meg`, `mfd`, `MHz`): its power of ten and its unit. The same letter
 * means different things on different parts, so the unit that a bare prefix belongs to is passed in.
 */
import type { Unit } from './part-spec';

export interface UnitWord {
  readonly exponent: number;
  readonly unit: Unit;
  /** True where the word names its unit (`kΩ`, `F`); false where only the kind of part gave it (`k`, `u`). */
  readonly named: boolean;
  /** Set where people write this word for two sizes: the power of ten of the other one. */
  readonly otherExponent: number | null;
}

const MILLI_OR_MEGA = { exponent: 6, otherExponent: -3 } as const;

/** Prefix letters by unit, exact case; anything that only appears in one case elsewhere is folded by `prefixOf`. */
const PREFIXES: Readonly<Record<Unit, Readonly<Record<string, number>>>> = {
  ohm: { k: 3, K: 3, M: 6, meg: 6, G: 9, g: 9, T: 12 },
  farad: { f: -15, p: -12, P: -12, n: -9, N: -9, u: -6, U: -6 },
  henry: { p: -12, n: -9, N: -9, u: -6, U: -6, m: -3, M: -3, k: 3 },
  // A crystal of millihertz does not exist, so m and M are both mega.
  hertz: { k: 3, K: 3, m: 6, M: 6, g: 9, G: 9 },
  volt: { u: -6, m: -3, k: 3, K: 3 },
  ampere: { n: -9, u: -6, U: -6, m: -3, M: -3, k: 3 },
  watt: { u: -6, m: -3, k: 3, K: 3 },
};

const NAMES: readonly (readonly [name: RegExp, unit: Unit])[] = [
  [/^(?:ohms?|Ω)$/i, 'ohm'],
  [/^(?:f|farads?)$/i, 'farad'],
  [/^(?:h|hy|henr(?:y|ys|ies))$/i, 'henry'],
  [/^(?:hz|hertz)$/i, 'hertz'],
  [/^(?:v|volts?|vdc|vac|vr)$/i, 'volt'],
  [/^(?:a|amps?|amperes?)$/i, 'ampere'],
  [/^(?:w|watts?)$/i, 'watt'],
];

/** Old and typewriter words for capacitance; `mfd` is microfarad everywhere it is met (common practice). */
const OLD_CAPACITANCE: Readonly<Record<string, number>> = {
  mfd: -6,
  ufd: -6,
  mmf: -12,
  mmfd: -12,
  uuf: -12,
  uufd: -12,
  pfd: -12,
  nfd: -9,
};

/**
 * @param word what follows the number, without spaces, after tidyValueText; never empty
 * @param home the unit that the kind of part is measured in, or null where the kind is not known
 * @returns null where the word is no unit for such a part
 */
export function readUnitWord(word: string, home: Unit | null): UnitWord | null {
  const old = OLD_CAPACITANCE[word.toLowerCase()];
  if (old !== undefined) return { exponent: old, unit: 'farad', named: true, otherExponent: null };
  if (/^[RrE]$/.test(word) && (home === 'ohm' || home === 'henry' || home === null)) {
    // On an inductor R is ohms: a ferrite bead is named by its impedance.
    return { exponent: 0, unit: 'ohm', named: word !== 'E', otherExponent: null };
  }
  const bare = /^(k|K|M|G|m)R$/.exec(word);
  if (bare !== null && home !== 'farad') return readUnitWord(`${bare[1] ?? ''}ohm`, home);
  for (const [prefix, name] of splits(word)) {
    const unit = NAMES.find(([pattern]) => pattern.test(name))?.[1];
    if (unit === undefined) continue;
    const read = withPrefix(prefix, unit, name);
    if (read !== null) return { ...read, unit, named: true };
  }
  return readBarePrefix(word, home);
}

/** `kOhm` is k + Ohm, `mFarad` m + Farad; the whole word comes first so that `Henry` is not H + enry. */
function splits(word: string): [prefix: string, name: string][] {
  const meg = /^meg(?:a)?/i.exec(word)?.[0];
  const cuts: [string, string][] = [
    ['', word],
    [word.slice(0, 1), word.slice(1)],
  ];
  if (meg !== undefined) cuts.push(['meg', word.slice(meg.length)]);
  if (/^kilo/i.test(word)) cuts.push(['k', word.slice(4)]);
  return cuts;
}

type Size = Pick<UnitWord, 'exponent' | 'otherExponent'>;

function withPrefix(prefix: string, unit: Unit, name: string): Size | null {
  if (prefix === '') return { exponent: 0, otherExponent: null };
  if (unit === 'ohm' && prefix === 'm') {
    // `mΩ` with the sign is a shunt; `mohm` is typed for megohm as often.
    return name === 'Ω' ? { exponent: -3, otherExponent: null } : MILLI_OR_MEGA;
  }
  if (unit === 'farad' && (prefix === 'm' || prefix === 'M')) {
    // On old drawings m and M before F are micro.
    return prefix === 'm' ? { exponent: -3, otherExponent: -6 } : { exponent: -6, otherExponent: -3 };
  }
  if (unit === 'volt' && prefix === 'M') return null;
  const exponent = PREFIXES[unit][prefix];
  return exponent === undefined ? null : { exponent, otherExponent: null };
}

function readBarePrefix(word: string, home: Unit | null): UnitWord | null {
  const prefix = /^meg$/i.test(word) ? 'meg' : word;
  if (home !== null) {
    if (home === 'ohm' && prefix === 'm') return { ...MILLI_OR_MEGA, unit: home, named: false };
    if (home === 'farad' && (prefix === 'm' || prefix === 'M')) {
      return { exponent: -6, otherExponent: -3, unit: home, named: false };
    }
    const exponent = PREFIXES[home][prefix];
    return exponent === undefined ? null : { exponent, unit: home, named: false, otherExponent: null };
  }
  if (/^(?:k|K|M|G|meg)$/.test(prefix)) {
    return { exponent: PREFIXES.ohm[prefix] ?? 0, unit: 'ohm', named: false, otherExponent: null };
  }
  if (/^[pnu]$/.test(prefix)) {
    return { exponent: PREFIXES.farad[prefix] ?? 0, unit: 'farad', named: false, otherExponent: null };
  }
  return null;
}
