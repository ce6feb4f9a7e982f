/** The order in which a person walks past bins: cabinet by cabinet, column by column, down one and up the next. Pure. */

export interface BinPlace {
  readonly cabinetWalkOrder: number;
  readonly cabinetCode: string;
  /** 1 is the leftmost. */
  readonly column: number;
  /** 1 is the top. */
  readonly row: number;
}

/** For Array.sort: serpentine by column, so that the hand never goes back to the top for the next drawer. */
export function byWalkingOrder(a: BinPlace, b: BinPlace): number {
  return (
    a.cabinetWalkOrder - b.cabinetWalkOrder ||
    a.cabinetCode.localeCompare(b.cabinetCode, 'en', { numeric: true }) ||
    a.column - b.column ||
    (a.column % 2 === 1 ? a.row - b.row : b.row - a.row)
  );
}
