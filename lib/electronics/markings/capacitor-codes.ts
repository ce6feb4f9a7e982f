/** Three figures on a small capacitor: two digits of picofarads and how many noughts follow (common practice). */

/**
 * @param farads 1 pF to 99 µF
 * @returns such as `104` for 100 nF, `4.7` for 4.7 pF; null where two digits don't tell it
 */
export function capacitorCode(farads: number): string | null {
  const picofarads = Number((farads * 1e12).toPrecision(12));
  if (!(picofarads >= 1) || picofarads >= 1e8) return null;
  if (picofarads < 10) return String(picofarads);
  const [digits = '', power = '0'] = picofarads.toExponential(1).split('e');
  if (Math.abs(Number(`${digits}e${power}`) / picofarads - 1) > 1e-9) return null;
  return `${digits.replace('.', '')}${Number(power) - 1}`;
}

/** @returns farads, or null where the text is no such code */
export function faradsOfCode(code: string): number | null {
  if (/^\d(?:\.\d)?$/.test(code)) return Number(`${code}e-12`);
  const match = /^(\d{2})(\d)$/.exec(code);
  return match ? Number(`${match[1]}e${Number(match[2]) - 12}`) : null;
}
