/** The name a new revision is offered: the letter after the last one (A, B … Z, AA), or the number after it. */
export function nextRevisionName(taken: readonly string[]): string {
  const letters = taken
    .filter((name) => /^[A-Z]{1,2}$/.test(name))
    .sort((a, b) => a.length - b.length || (a < b ? -1 : 1));
  const last = letters.at(-1);
  if (last === undefined) return taken.length === 0 ? 'A' : `${taken.length + 1}`;
  const next = last.endsWith('Z')
    ? last === 'Z'
      ? 'AA'
      : `${after(last[0] ?? 'A')}A`
    : last.slice(0, -1) + after(last.at(-1) ?? 'A');
  return next;
}

const after = (letter: string): string => String.fromCharCode(letter.charCodeAt(0) + 1);
