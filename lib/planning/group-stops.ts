/**
 * A pick list's stops: all that a person takes of one part out of one bin is one stop, whichever lots and lines it is for,
 * because that is one drawer opened once. Pure.
 */
import { type BinPlace, byWalkingOrder } from './walking-order';

export interface PickLine extends BinPlace {
  readonly binId: string;
  readonly partId: string;
  readonly partName: string;
  /** Order of the line in the revision; what a stop's lines are listed by. */
  readonly position: number;
}

/** Groups in walking order; parts of one bin by name. Numbered from 1 by their place in the list. */
export function groupStops<Line extends PickLine>(lines: readonly Line[]): (readonly [Line, ...Line[]])[] {
  const groups = new Map<string, [Line, ...Line[]]>();
  for (const line of [...lines].sort((a, b) => a.position - b.position)) {
    const key = `${line.binId} ${line.partId}`;
    const group = groups.get(key);
    if (group) group.push(line);
    else groups.set(key, [line]);
  }
  return [...groups.values()].sort(
    ([a], [b]) => byWalkingOrder(a, b) || a.partName.localeCompare(b.partName, 'en', { numeric: true }),
  );
}
