/** Parts on which life hangs: replaced by the identical certified part or not at all. */
import type { PartSpec } from '../part-spec';
import { type Check, fail, remark, type StandInContext, unknown } from './check';

export const SAFETY_CAUTION =
  'Same type and approval only: the local electrical code rules here, and mains work belongs to a licensed person.';

const SAFETY_WORDS: readonly (readonly [RegExp, string])[] = [
  [/\b[XY][1-4]\b/, 'a class X or Y capacitor'],
  [/\bthermal\s+(?:fuse|cut-?out)/i, 'a thermal fuse'],
  [/\b(?:varistor|MOV)\b/i, 'a varistor'],
  [/\b(?:fusible|flame-?proof)\b/i, 'a fusible resistor'],
  [/\b(?:mains|line voltage)\b|\b(?:1[012]\d|2[0-7]\d)\s*V\s*~|\b(?:1[012]\d|2[0-7]\d)\s*V?\s*AC\b/i, 'a mains part'],
  [/\bIEC\s+(?:inlet|socket)|\bpower (?:inlet|cord)/i, 'a mains inlet'],
  [/\b(?:protective earth|earth(?:ing)? (?:terminal|lug|wire|strap))\b/i, 'the protective earth'],
  [/\b(?:li-?ion|lipo|lithium)\b/i, 'a lithium cell'],
  [/\b(?:insulating|insulation) (?:washer|sleev)/i, 'insulation'],
];

/** What safety part the text or kind names, or null. Signal transformers say so (audio, line level, 600 Ω). */
export function safetyPart(spec: PartSpec): string | null {
  if (spec.kind === 'fuse') return 'a fuse';
  if (spec.kind === 'transformer' && !/\b(?:audio|signal|pulse|600\s*(?:Ω|ohm|R)|microphone|driver)\b/i.test(spec.text))
    return 'a mains transformer';
  // X1 and Y2 are designators and model numbers elsewhere; only capacitors carry them as classes.
  const named = SAFETY_WORDS.find(
    ([form, name]) => form.test(spec.text) && (name !== 'a class X or Y capacitor' || spec.kind === 'capacitor'),
  );
  return named?.[1] ?? null;
}

/** @returns the checks that close the matter, or null where the part is no safety part */
export function assessSafety(wanted: PartSpec, offered: PartSpec, { use }: StandInContext): Check[] | null {
  const named = safetyPart(wanted) ?? (use === 'safety' ? 'a safety part' : null);
  if (named === null) return null;
  return [fail('safety', wanted.text, offered.text, `The place wants ${named}. ${SAFETY_CAUTION}`)];
}

/** What else must be said of a part that may or may not bridge a barrier. */
export function safetyRemarks(wanted: PartSpec, offered: PartSpec, { use }: StandInContext): Check[] {
  if (wanted.kind === 'optocoupler' && (use === 'power' || use === null)) {
    return [unknown('safety', wanted.text, offered.text, `Does it bridge a mains barrier? ${SAFETY_CAUTION}`)];
  }
  const offeredAs = wanted.kind === 'capacitor' ? safetyPart(offered) : null;
  return offeredAs === null
    ? []
    : [
        remark(
          'safety',
          wanted.text,
          offered.text,
          'A safety capacitor serves as a plain film one, but it is kept better for the mains.',
        ),
      ];
}
