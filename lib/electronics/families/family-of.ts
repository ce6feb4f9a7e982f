/**
 * Reads a part number in any maker's usual spelling, grade and package to its family. It names what the number is; it
 * says nothing about values: `4700`, `100n` and `510` are no families, and a bare number such as `4013` is one only
 * because callers ask about texts they already take for part numbers.
 */
import type { PartKind } from '../part-spec';
import {
  LADDER_78,
  LDO_VOLTS,
  LOGIC_4000,
  LOGIC_74,
  SPELLINGS,
  ZENER_1N47,
  ZENER_1N52,
  ZENER_EUROPEAN,
  ZENER_SERIES,
} from './spellings';

export interface FamilyName {
  readonly familyId: string;
  readonly kind: PartKind;
}

/**
 * @param text a part number, or a text that begins with one
 * @returns the family, or null where the text is a value or a number that no family carries
 */
export function familyOf(text: string): FamilyName | null {
  for (const candidate of candidatesIn(text)) {
    const found = readCompact(candidate);
    if (found !== null) return found;
  }
  return null;
}

function candidatesIn(text: string): string[] {
  const plain = text.normalize('NFKC').trim().toUpperCase().replace(/[–—]/g, '-').replace(/Μ/g, 'U');
  if (plain === '' || plain.length > 80 || LOOKS_LIKE_VALUE.test(plain)) return [];
  const tokens = plain.split(/[\s;()[\]"']+/).filter((token) => token !== '');
  const [first = '', second = '', third = ''] = tokens;
  return [...new Set([tokens.length <= 3 ? first + second + third : '', first + second, first])].filter(
    (token) => token !== '',
  );
}

/** Values as people write them: a plain number passes through to the number tables, everything with a unit stops here. */
const LOOKS_LIKE_VALUE = /^[.,]?\d+(?:[.,]\d+)?\s*(?:[RKMGPU]|[NPUM]F|[MU]?H|OHMS?|Ω|%|V|HZ|KHZ|MHZ)$/;
const BARE_NUMBERS = new Set(['555', '556', '741']);

function readCompact(compact: string): FamilyName | null {
  return (
    readLogic4000(compact) ??
    readLogic74(compact) ??
    readFixedRegulator(compact) ??
    readVoltageInNumber(compact) ??
    readZener(compact) ??
    readHead(compact)
  );
}

// Makers' prefixes of 4000-series logic. MC1 and NLV1 go before four digits (MC14093); 40106 is MC14106 there.
const LOGIC_4000_FORM =
  /^(CD|HEF|HCF|HCC|HBF|MC1|NLV1|HD1|TC|BU|GD|KK|MSM|UPD|M|F|SCL|CM|V|XD|NTE|MMC|CA|SN)?(40[1-9]\d{2}|4\d{3})(.*)$/;
const LOGIC_SUFFIX = /^(?:-?(?:U?B|A)[A-Z]{0,4}(?:\d{1,3}[A-Z0-9]{0,3})?|[NEDPT]|)(?:[-,/].*)?$/;
const BARE_SUFFIX = /^(?:U?B[A-Z]{0,3}|[NED]|)$/;

function readLogic4000(compact: string): FamilyName | null {
  const motorolaHexSchmitt = /^(?:MC|NLV)14106/.test(compact) ? compact.replace('14106', '140106') : compact;
  const form = LOGIC_4000_FORM.exec(motorolaHexSchmitt);
  if (form === null) return null;
  const [, prefix, number = '', suffix = ''] = form;
  if (!LOGIC_4000.includes(number)) return null;
  const suffixReads =
    prefix === undefined ? BARE_SUFFIX.test(suffix) : LOGIC_SUFFIX.test(suffix) || /^[-,/]/.test(suffix);
  return suffixReads ? { familyId: number, kind: 'ic' } : null;
}

const LOGIC_74_FORM =
  /^(?:SN|MC|CD|MM|DM|M|TC|HD|N|U|KK|GD|IN|MSM|PC|XD|HN|T)?(?:74|54)(LS|HCT|HCU|HC)?(\d{2,4})([^0-9].*)?$/;

function readLogic74(compact: string): FamilyName | null {
  const form = LOGIC_74_FORM.exec(compact);
  if (form === null) return null;
  const [, technology = 'TTL', number = ''] = form;
  const made = LOGIC_74[number];
  const code = technology.toLowerCase();
  if (made === undefined || !made.includes(code)) return null;
  return { familyId: `74${code === 'ttl' ? '' : code}${number}`, kind: 'ic' };
}

const FIXED_FORM =
  /^(?:LM|L|UA|MC|NCV|KA|NJM|JRC|BA|TA|UPC|AN|GL|KIA|HA|CJ|TS|UTC|WS|XD|MAX|SGS)?(7[89])(L|M)?(\d{2})([^0-9].*)?$/;
const OLD_FIXED_FORM = /^LM(340|320)(?:[A-Z]{0,3}-?)(\d{1,2})(?:\.0)?(?:[^0-9].*)?$/;

function readFixedRegulator(compact: string): FamilyName | null {
  const old = OLD_FIXED_FORM.exec(compact);
  const form = FIXED_FORM.exec(compact);
  const series = old === null ? `${form?.[1] ?? ''}${(form?.[2] ?? '').toLowerCase()}` : old[1] === '340' ? '78' : '79';
  const volts = (old === null ? form?.[3] : old[2]?.padStart(2, '0')) ?? '';
  return LADDER_78[series]?.includes(volts) === true ? { familyId: `${series}${volts}`, kind: 'regulator' } : null;
}

const VOLTAGE_HEADS: readonly (readonly [RegExp, string, PartKind])[] = [
  [
    /^(?:LM1117|AMS1117|LD1117|NCP1117|AZ1117|AP1117|TLV1117|LT1117|SPX1117|REG1117|UZ1117|XC1117)/,
    'lm1117',
    'regulator',
  ],
  [/^LM2940/, 'lm2940', 'regulator'],
  [/^LM2931/, 'lm2931', 'regulator'],
  [/^LP2950/, 'lp2950', 'regulator'],
  [/^LP2951/, 'lp2951', 'regulator'],
  [/^MCP1700/, 'mcp1700', 'regulator'],
  [/^LM4040/, 'lm4040', 'ic'],
  [/^LM336/, 'lm336', 'ic'],
  [/^LM[23]85/, 'lm385', 'ic'],
];

function readVoltageInNumber(compact: string): FamilyName | null {
  for (const [head, family, kind] of VOLTAGE_HEADS) {
    const start = head.exec(compact)?.[0];
    if (start === undefined) continue;
    const written = voltsWritten(compact.slice(start.length), LDO_VOLTS[family] ?? []);
    return written === null ? null : { familyId: `${family}-${written}`, kind };
  }
  return null;
}

/** `-3.3`, `V33`, `CIM3-10.0`, `-3302E`, `-120` and `-ADJ`; digits that belong to the package are passed over. */
function voltsWritten(rest: string, offered: readonly string[]): string | null {
  if (offered.includes('adj') && (rest === '' || /ADJ/.test(rest))) return 'adj';
  const decimal = /(\d{1,2}\.\d{1,2})(?!.*\d\.\d)/.exec(rest)?.[1];
  if (decimal !== undefined) return oneOf(String(Number(decimal)), offered);
  const digits = /(?:-|V)(\d{1,4})(?=[^0-9]|$)/.exec(rest)?.[1];
  if (digits === undefined) return /^\d+(?:V|$)/.test(rest) ? oneOf(rest.replace(/V.*$/, ''), offered) : null;
  // "-12" is 12 V on some 1117s and 1.2 V on others: no guess, a person reads the part.
  if (digits === '12' && !offered.includes('12')) return null;
  return (
    oneOf(digits, offered) ?? (digits.length >= 2 ? oneOf(String(Number(digits.slice(0, 2)) / 10), offered) : null)
  );
}

function oneOf(volts: string, offered: readonly string[]): string | null {
  return offered.includes(volts) ? volts : null;
}

const ZENER_1N_FORM = /^1N(47[2-6]\d|52[2-5]\d)([^0-9].*)?$/;
const ZENER_EUROPEAN_FORM = /^(BZX55|BZX79|BZX84|BZX85|BZV55|BZV85|BZT52)-?[ABCF]?-?(\d{1,2}(?:V\d)?)([^0-9].*)?$/;

function readZener(compact: string): FamilyName | null {
  const american = ZENER_1N_FORM.exec(compact);
  if (american !== null) {
    const number = Number(american[1]);
    const known = number < 5000 ? ZENER_1N47[number - 4728] : ZENER_1N52[number - 5221];
    return known === undefined ? null : { familyId: `1n${number}`, kind: 'diode' };
  }
  const european = ZENER_EUROPEAN_FORM.exec(compact);
  const series = european?.[1]?.toLowerCase() ?? '';
  const code = european?.[2] ?? '';
  const volts = /^\d$/.test(code) ? `${code}V0` : code;
  return ZENER_SERIES.includes(series) && ZENER_EUROPEAN.includes(volts)
    ? { familyId: `${series}-${volts.toLowerCase()}`, kind: 'diode' }
    : null;
}

interface Head {
  readonly head: string;
  readonly name: FamilyName;
}

// Longest first, so that LM317L is not read as LM317 with grade L, nor BAT54S as BAT54.
const HEADS: readonly Head[] = SPELLINGS.flatMap((spelling) =>
  spelling.heads.map((head) => ({ head, name: { familyId: spelling.id, kind: spelling.kind } })),
).sort((a, b) => b.head.length - a.head.length);

function readHead(compact: string): FamilyName | null {
  for (const { head, name } of HEADS) {
    if (!compact.startsWith(head)) continue;
    const suffix = compact.slice(head.length);
    if (/^\d/.test(suffix)) continue;
    if (/^\d+$/.test(head) && !bareNumberReads(head, suffix)) continue;
    return name;
  }
  return null;
}

/** A number without a maker's letters: four digits and 555 stand alone; three digits such as 324 need a suffix that is no unit. */
function bareNumberReads(head: string, suffix: string): boolean {
  if (suffix === '') return head.length >= 4 || BARE_NUMBERS.has(head);
  return (
    /^(?:C|AC|I|E|N|CN|CP|D|DD|CD|P|DIP|G|L|UC)?(?:N|P|D|E|DR|-.*)?$/.test(suffix) &&
    !(head.length < 4 && /^[PRKMGUF]$/.test(suffix))
  );
}
