/** Reads a circuit's rails as people write them: `+12,-12`, `±12`, `+5`, `12/-12`, `+/-15`, `5V`. */

export type RailsProblem =
  | 'empty'
  | 'not-a-number'
  | 'wrong-way-round'
  | 'out-of-range'
  | 'zero'
  | 'twice'
  | 'too-many';

export class RailsError extends Error {
  override readonly name = 'RailsError';
  constructor(
    readonly problem: RailsProblem,
    message: string,
  ) {
    super(message);
  }
}

/** Beyond this a module is no low-voltage circuit, and the checks here do not hold. */
const HIGHEST_VOLTS = 60;
const MOST_RAILS = 8;

/**
 * @returns signed volts, positive rails first, each from the highest down
 * @throws RailsError with the reason: empty, no number, wrong way round (`-12,+12`, where `+12,-12` is meant), zero,
 *   beyond ±60 V, the same rail twice, more than eight
 */
export function readRails(text: string): number[] {
  const plain = text.normalize('NFKC').replace(/[−–—]/g, '-').replace(/\s+/g, ' ').trim();
  if (plain === '') throw new RailsError('empty', 'No rails were given: write them like "+12,-12", "±12" or "+5".');
  if (plain.length > 100) throw new RailsError('too-many', 'That is too long to be a list of rails.');
  const split = plain.replace(/\+ ?\/ ?-|\+-/g, '±');
  const rails = split.split(/\s*(?:[,;/]|\band\b)\s*|\s+(?=[+±-])/i).flatMap((piece) => readOne(piece.trim(), text));
  if (rails.length > MOST_RAILS)
    throw new RailsError('too-many', `A module has at most ${MOST_RAILS} rails; "${text}" has ${rails.length}.`);
  if (new Set(rails).size !== rails.length) throw new RailsError('twice', `"${text}" names one rail twice.`);
  // Later negatives are usual (+12,-12,+5); a list that starts below ground has its ends swapped.
  if ((rails[0] ?? 0) < 0 && rails.some((rail) => rail > 0)) {
    throw new RailsError(
      'wrong-way-round',
      `"${text}" has the rails the wrong way round: the positive one comes first, like "+12,-12".`,
    );
  }
  return [...rails].sort((a, b) => b - a);
}

function readOne(piece: string, whole: string): number[] {
  const form = /^([+±-]?)\s*(\d+(?:\.\d+)?)\s*V?(?:olts?)?(?:\s*DC)?$/i.exec(piece);
  const [, sign, digits] = form ?? [];
  if (form === null || digits === undefined)
    throw new RailsError(
      'not-a-number',
      `"${piece}" in "${whole}" is no rail: write volts like "+12,-12", "±12" or "+5".`,
    );
  const volts = Number(digits);
  if (volts === 0) throw new RailsError('zero', `"${whole}" names a rail of 0 V; ground need not be listed.`);
  if (volts > HIGHEST_VOLTS)
    throw new RailsError(
      'out-of-range',
      `${volts} V is beyond ${HIGHEST_VOLTS} V: these checks are for low-voltage circuits.`,
    );
  if (sign === '±') return [volts, -volts];
  return [sign === '-' ? -volts : volts];
}
