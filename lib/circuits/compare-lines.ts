/** Two parts lists side by side, designator by designator and part by part. Pure. */

export interface ComparedLine {
  readonly designators: readonly string[];
  readonly quantity: number;
  readonly fitted: boolean;
  readonly text: string;
  readonly specKey: string;
}

export interface Difference {
  readonly change: 'added' | 'gone' | 'part' | 'quantity' | 'fitted';
  /** The designators that it concerns; empty for lines without. */
  readonly designators: readonly string[];
  readonly before: ComparedLine | null;
  readonly after: ComparedLine | null;
}

export interface PartDifference {
  readonly text: string;
  readonly before: number;
  readonly after: number;
}

const same = (a: ComparedLine, b: ComparedLine): boolean => a.specKey === b.specKey;

/** By designator where there are any; lines without (hardware, wire) by what they ask for. */
export function compareByDesignator(before: readonly ComparedLine[], after: readonly ComparedLine[]): Difference[] {
  const [old, now] = [indexOf(before), indexOf(after)];
  const grouped = new Map<string, Difference & { designators: string[] }>();
  const differ = (
    change: Difference['change'],
    designator: string,
    a: ComparedLine | null,
    b: ComparedLine | null,
  ): void => {
    const key = `${change}|${a === null ? '' : before.indexOf(a)}|${b === null ? '' : after.indexOf(b)}`;
    const group = grouped.get(key) ?? { change, designators: [], before: a, after: b };
    if (!designator.startsWith(NAMELESS)) group.designators.push(designator);
    grouped.set(key, group);
  };
  for (const [designator, line] of old) {
    const other = now.get(designator);
    if (other === undefined) differ('gone', designator, line, null);
    else if (!same(line, other)) differ('part', designator, line, other);
    else if (line.fitted !== other.fitted) differ('fitted', designator, line, other);
    else if (unitsPerDesignator(line) !== unitsPerDesignator(other)) differ('quantity', designator, line, other);
  }
  for (const [designator, line] of now) if (!old.has(designator)) differ('added', designator, null, line);
  return [...grouped.values()];
}

/** What must be on the shelf more or less: units by what is asked for, fitted lines only. */
export function compareByPart(before: readonly ComparedLine[], after: readonly ComparedLine[]): PartDifference[] {
  const units = new Map<string, { text: string; before: number; after: number }>();
  const add = (lines: readonly ComparedLine[], side: 'before' | 'after'): void => {
    for (const line of lines) {
      if (!line.fitted) continue;
      const total = units.get(line.specKey) ?? { text: line.text, before: 0, after: 0 };
      total[side] += line.quantity;
      units.set(line.specKey, total);
    }
  };
  add(before, 'before');
  add(after, 'after');
  return [...units.values()].filter((one) => one.before !== one.after);
}

const NAMELESS = '\u0000';

function indexOf(lines: readonly ComparedLine[]): Map<string, ComparedLine> {
  const index = new Map<string, ComparedLine>();
  const seen = new Map<string, number>();
  for (const line of lines) {
    for (const designator of line.designators) index.set(designator, line);
    if (line.designators.length > 0) continue;
    const nth = (seen.get(line.specKey) ?? 0) + 1;
    seen.set(line.specKey, nth);
    index.set(`${NAMELESS}${line.specKey}#${nth}`, line);
  }
  return index;
}

function unitsPerDesignator({ quantity, designators }: ComparedLine): number {
  return designators.length === 0 ? quantity : quantity / designators.length;
}
