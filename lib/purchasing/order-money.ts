/**
 * The arithmetic of orders, exact: unit prices are decimal text with at most six places, money is whole minor units of
 * an ISO 4217 currency. Pure. Nothing here is a float.
 */

export interface Break {
  readonly fromQuantity: number;
  /** Decimal text in the currency's major unit, at most six places: `0.0185`. */
  readonly unitPrice: string;
}

/** Minor units a major unit has (ISO 4217): 2 for most, 0 for JPY and KRW and a few, 3 for KWD and others. */
export function minorDigits(currency: string): number {
  if (['JPY', 'KRW', 'ISK', 'CLP', 'VND', 'XAF', 'XOF', 'XPF'].includes(currency)) return 0;
  if (['KWD', 'BHD', 'OMR', 'JOD', 'TND', 'IQD', 'LYD'].includes(currency)) return 3;
  return 2;
}

const MICRO_DIGITS = 6;

/** Millionths of the major unit. Throws RangeError where the text is no such price. */
export function microPrice(unitPrice: string): bigint {
  const match = /^(\d{1,12})(?:\.(\d{1,6}))?$/.exec(unitPrice);
  if (!match) throw new RangeError(`not a unit price with at most six places: ${unitPrice}`);
  return BigInt(match[1] ?? '0') * 1_000_000n + BigInt((match[2] ?? '').padEnd(MICRO_DIGITS, '0'));
}

/** quantity × unit price, rounded half up to a minor unit; once a line, never per piece. */
export function lineTotalMinor(quantity: number, unitPrice: string, currency: string): number {
  const exact = BigInt(quantity) * microPrice(unitPrice);
  const divisor = 10n ** BigInt(MICRO_DIGITS - minorDigits(currency));
  return Number((exact + divisor / 2n) / divisor);
}

/** The price that holds at a quantity: the highest break not above it; below the first break, the first. Null without breaks. */
export function unitPriceAt(breaks: readonly Break[], quantity: number): string | null {
  const sorted = [...breaks].sort((a, b) => a.fromQuantity - b.fromQuantity);
  let price = sorted[0]?.unitPrice ?? null;
  for (const step of sorted) if (step.fromQuantity <= quantity) price = step.unitPrice;
  return price;
}

/** The least quantity that can be ordered to get at least `needed`: the minimum (which the first break may raise), in whole multiples. */
export function orderableQuantity(
  needed: number,
  rules: { orderMultiple: number; minimumQuantity: number; breaks: readonly Break[] },
): number {
  const firstBreak = rules.breaks.length === 0 ? 1 : Math.min(...rules.breaks.map((step) => step.fromQuantity));
  const floor = Math.max(needed, rules.minimumQuantity, firstBreak, 1);
  return Math.ceil(floor / rules.orderMultiple) * rules.orderMultiple;
}

/**
 * Quantity, price and total that cost least while covering `needed`: buying up to a later break is taken when that is
 * cheaper in all. Null without breaks.
 */
export function cheapestPurchase(
  needed: number,
  rules: { orderMultiple: number; minimumQuantity: number; breaks: readonly Break[]; currency: string },
): { quantity: number; unitPrice: string; totalMinor: number } | null {
  let best: { quantity: number; unitPrice: string; totalMinor: number } | null = null;
  for (const from of [
    needed,
    ...rules.breaks.map((step) => step.fromQuantity).filter((quantity) => quantity > needed),
  ]) {
    const quantity = orderableQuantity(from, rules);
    const unitPrice = unitPriceAt(rules.breaks, quantity);
    if (unitPrice === null) return null;
    const totalMinor = lineTotalMinor(quantity, unitPrice, rules.currency);
    if (!best || totalMinor < best.totalMinor || (totalMinor === best.totalMinor && quantity > best.quantity))
      best = { quantity, unitPrice, totalMinor };
  }
  return best;
}

export function postageFor(
  goodsMinor: number,
  supplier: { postageMinor: number; postageFreeFromMinor: number | null },
): number {
  return supplier.postageFreeFromMinor !== null && goodsMinor >= supplier.postageFreeFromMinor
    ? 0
    : supplier.postageMinor;
}

/**
 * Money back for units that never came: what the paid line cost less what the units that came cost at the same unit
 * price, so that refunds of one line always add up to its total whatever the order they are made in.
 */
export function refundForMissing(line: {
  quantity: number;
  unitPrice: string;
  totalMinor: number;
  cancelledBefore: number;
  cancelledNow: number;
  currency: string;
}): number {
  const keptBefore = line.quantity - line.cancelledBefore;
  const keptAfter = keptBefore - line.cancelledNow;
  const worth = (units: number) =>
    units === line.quantity ? line.totalMinor : lineTotalMinor(units, line.unitPrice, line.currency);
  return worth(keptBefore) - worth(keptAfter);
}

/** Money for a person: `318.40 EUR` from minor units. */
export function moneyText(minor: number, currency: string): string {
  const digits = minorDigits(currency);
  const text = String(Math.abs(minor)).padStart(digits + 1, '0');
  const major = digits === 0 ? text : `${text.slice(0, -digits)}.${text.slice(-digits)}`;
  return `${minor < 0 ? '-' : ''}${major} ${currency}`;
}
