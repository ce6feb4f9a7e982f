/** How lines, kinds and checks are said on screen. Pure. */

const KINDS: Readonly<Record<string, string>> = { ic: 'IC', led: 'LED', pcb: 'board', other: 'part' };
export const kindWord = (kind: string): string => KINDS[kind] ?? kind;

const CHECKS: Readonly<Record<string, string>> = {
  'pin-out': 'Pin-out',
  part: 'The part itself',
  'named-in-list': 'Named in the list',
  'unity-gain': 'Unity gain',
};
/** `schmitt-inputs` → `Schmitt inputs`. */
export function checkWord(check: string): string {
  const words = CHECKS[check] ?? check.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** `R1–R4, R9`: runs of three and more are drawn together. */
export function designatorText(designators: readonly string[], most = 8): string {
  const runs: string[] = [];
  let at = 0;
  while (at < designators.length) {
    const first = /^(\D*)(\d+)$/.exec(designators[at] ?? '');
    let end = at;
    while (first && designators[end + 1] === `${first[1]}${Number(first[2]) + (end + 1 - at)}`) end += 1;
    if (end - at >= 2) runs.push(`${designators[at]}–${designators[end]}`);
    else runs.push(...designators.slice(at, end + 1));
    at = end + 1;
  }
  return runs.length <= most ? runs.join(', ') : `${runs.slice(0, most).join(', ')} … (${designators.length})`;
}

/** `+4.2 %`, `−0.5 %`. */
export function percentText(percent: number): string {
  const rounded = Number(percent.toPrecision(2));
  return `${rounded > 0 ? '+' : rounded < 0 ? '−' : ''}${Math.abs(rounded)} %`;
}

export const USE_WORDS = [
  ['', 'not said'],
  ['timing', 'timing or tuning'],
  ['audio', 'audio path'],
  ['control', 'control voltage'],
  ['decoupling', 'decoupling'],
  ['logic', 'logic'],
  ['power', 'supply'],
  ['safety', 'mains or isolation'],
] as const;
