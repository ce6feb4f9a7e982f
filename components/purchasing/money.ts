/** Money as people read it. The server counts in minor units (cents); only the last step makes text of them. */

/** `€12.40` from 1240 and EUR. */
export function money(minor: number, currency: string): string {
  const format = new Intl.NumberFormat('en-GB', { style: 'currency', currency });
  const digits = format.resolvedOptions().maximumFractionDigits ?? 2;
  return format.format(minor / 10 ** digits);
}

/** A unit price with as many places as it has, at least two: `0.0105` stays so. */
export function unitPriceText(price: string, currency: string): string {
  const places = Math.min(6, Math.max(2, (price.replace(/0+$/, '').split('.')[1] ?? '').length));
  return new Intl.NumberFormat('en-GB', {
    style: 'currency',
    currency,
    minimumFractionDigits: places,
    maximumFractionDigits: places,
  }).format(Number(price));
}
