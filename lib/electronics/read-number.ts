/**
 * The number in front of a unit, with decimal comma or point and thousands separators. `1,000` and `4.700` may be either;
 * both readings are given and the caller, who knows the unit, decides or asks.
 */

export interface ReadNumber {
  /** Plain decimal digits, such as `4.7` or `.1` as `0.1`. */
  readonly decimal: string;
  /** The other reading where the separator may be decimal or thousands; null where it is plain. */
  readonly asThousands: string | null;
  readonly separator: ',' | '.' | null;
}

/** @returns null where the text is no positive number */
export function readNumber(text: string): ReadNumber | null {
  const plain = (decimal: string): ReadNumber => ({ decimal, asThousands: null, separator: null });
  if (/^\d+$/.test(text)) return plain(text);
  if (/^\d{1,3}(?:[' ]\d{3})+(?:[.,]\d+)?$/.test(text)) return plain(text.replace(/[' ]/g, '').replace(',', '.'));
  if (/^\d{1,3}(?:,\d{3})+\.\d+$/.test(text) || /^\d{1,3}(?:,\d{3}){2,}$/.test(text))
    return plain(text.replaceAll(',', ''));
  if (/^\d{1,3}(?:\.\d{3})+,\d+$/.test(text) || /^\d{1,3}(?:\.\d{3}){2,}$/.test(text)) {
    return plain(text.replaceAll('.', '').replace(',', '.'));
  }
  const form = /^(\d*)([.,])(\d*)$/.exec(text);
  if (form === null) return null;
  const [, whole = '', mark, fraction = ''] = form;
  if (whole + fraction === '') return null;
  const decimal = `${whole === '' ? '0' : whole}${fraction === '' ? '' : `.${fraction}`}`;
  const separator = mark === ',' ? ',' : '.';
  // Only round thousands (4.700, 1,000) are taken for such: 1.024 and 3,579 are decimals with three places.
  const mayBeThousands = /^[1-9]\d{0,2}$/.test(whole) && /^\d\d0$/.test(fraction);
  return { decimal, asThousands: mayBeThousands ? whole + fraction : null, separator };
}
