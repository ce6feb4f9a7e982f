/** A value as CSV text that no spreadsheet runs as a formula. */

/**
 * Text that begins with = + - @ tab or return is led by an apostrophe, as OWASP's page on CSV injection advises; plain
 * numbers are left alone, so that −5 stays a number.
 */
export function safeCell(value: unknown): string {
  if (value === null || value === undefined) return '';
  const text = Array.isArray(value) ? value.join(', ') : String(value);
  if (typeof value === 'number') return text;
  return /^[=+\-@\t\r]/.test(text) && !/^[+-]?\d+(\.\d+)?$/.test(text) ? `'${text}` : text;
}
