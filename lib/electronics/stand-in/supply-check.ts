/** Whether a part lives on the circuit's rails. */
import type { Supply } from '../families/family';
import { type Check, effect, fail, measure, pass, remark, unknown, weighed } from './check';

export function supplyRange(supply: Supply): string {
  const low = supply.minimumVolts === null ? '?' : measure(supply.minimumVolts.value, '').trim();
  const high = supply.maximumVolts === null ? '?' : measure(supply.maximumVolts.value, '').trim();
  return `${low} to ${high} V`;
}

/**
 * @param volts what the part's supply pins see, in volts; null where the rails are not known
 * @param name the offered part, for the sentence
 */
export function checkSupply(wanted: Supply, offered: Supply, volts: number | null, name: string): Check {
  const words = [supplyRange(wanted), supplyRange(offered)] as const;
  const { minimumVolts, maximumVolts, absoluteVolts } = offered;
  if (volts === null) {
    const covers =
      minimumVolts !== null &&
      maximumVolts !== null &&
      wanted.minimumVolts !== null &&
      wanted.maximumVolts !== null &&
      minimumVolts.value <= wanted.minimumVolts.value &&
      maximumVolts.value >= wanted.maximumVolts.value;
    return covers
      ? weighed(
          pass('supply', ...words, 'Its supply range covers that of the wanted part.'),
          minimumVolts,
          maximumVolts,
        )
      : unknown(
          'supply',
          ...words,
          `Which rails feed it? The ${name} has not the whole supply range of the wanted part.`,
        );
  }
  if (maximumVolts === null && absoluteVolts === null)
    return unknown('supply', measure(volts, 'V'), words[1], `The supply limits of the ${name} are not in the tables.`);
  if (
    absoluteVolts !== null &&
    volts > absoluteVolts.value &&
    (absoluteVolts.basis !== 'memory' || maximumVolts === null)
  ) {
    return weighed(
      fail(
        'supply',
        measure(volts, 'V'),
        words[1],
        `${measure(volts, 'V')} is past the absolute maximum of ${measure(absoluteVolts.value, 'V')}: the ${name} dies.`,
      ),
      absoluteVolts,
    );
  }
  if (maximumVolts !== null && volts > maximumVolts.value) {
    return weighed(
      fail(
        'supply',
        measure(volts, 'V'),
        words[1],
        `${measure(volts, 'V')} is more than the ${measure(maximumVolts.value, 'V')} that the ${name} may have.`,
      ),
      maximumVolts,
    );
  }
  if (minimumVolts !== null && volts < minimumVolts.value) {
    return weighed(
      fail(
        'supply',
        measure(volts, 'V'),
        words[1],
        `${measure(volts, 'V')} is too little: the ${name} wants ${measure(minimumVolts.value, 'V')} at least.`,
      ),
      minimumVolts,
    );
  }
  return weighed(
    pass('supply', measure(volts, 'V'), words[1], `${measure(volts, 'V')} is inside what the ${name} may have.`),
    maximumVolts,
  );
}

/** 4000-series parts end at 18 V from some makers and at 15 V from others. */
export function checkSupply4000(check: Check, volts: number | null): Check {
  if (check.outcome !== 'pass' || volts === null || volts <= 15) return check;
  return effect(
    check.check,
    check.wanted,
    check.offered,
    'Above 15 V only some makers’ 4000-series parts are allowed: read the maker’s sheet.',
  );
}

export function splitSupplyRemark(
  rails: readonly number[],
  volts: number | null,
  span: number | null,
  limit: number | null,
): Check | null {
  if (volts === null || span === null || limit === null || span <= limit || !rails.some((rail) => rail < 0))
    return null;
  return remark(
    'supply-connection',
    measure(span, 'V'),
    measure(limit, 'V'),
    'It must sit between ground and one rail, not between both rails.',
  );
}
