/**
 * One spelling for what people and programs write in many: full-width digits and letters, both micro signs, both ohm
 * signs, typographic dashes, quotes and spaces. Case is kept, since m and M differ.
 */

/** @returns the text with single spaces, `u` for micro, `Ω` for the ohm sign, and `-`, `/`, `'` in one form each */
export function tidyValueText(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/[\u00B5\u03BC]/g, 'u')
    .replace(/[\u2126\u03C9]/g, 'Ω')
    .replace(/[\u2010-\u2015\u2212]/g, '-')
    .replace(/[\u2018\u2019\u02BC]/g, "'")
    .replace(/[\u201C\u201D]/g, '"')
    .replace(/\u2044/g, '/')
    .replace(/[\u200B\u200E\uFEFF]/g, '')
    .replace(/\s+/g, ' ')
    .trim();
}
