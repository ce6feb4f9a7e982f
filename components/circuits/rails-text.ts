/** Supply rails as a builder writes them: `±12 V`, `+12 V, −5 V`, `+5 V`. */
export function railsText(rails: readonly number[]): string {
  const [first, second] = rails;
  if (first === undefined) return 'no rails given';
  if (rails.length === 2 && second !== undefined && first === -second) return `±${Math.abs(first)} V`;
  return rails.map((volts) => `${volts < 0 ? '−' : '+'}${Math.abs(volts)} V`).join(', ');
}
