/** What a column of a parts list may be, as people say it; the keys are the reader's. */
export const COLUMN_ROLE_WORDS = [
  ['designators', 'designators'],
  ['quantity', 'quantity'],
  ['value', 'value or part'],
  ['kind', 'kind of part'],
  ['description', 'description'],
  ['part-number', 'part number'],
  ['maker', 'maker'],
  ['package', 'case'],
  ['notes', 'ratings and notes'],
  ['fitted', 'fitted or not'],
  ['order-code', 'order code'],
  ['price', 'price'],
  ['index', 'row number'],
  ['ignore', 'nothing we need'],
] as const;
