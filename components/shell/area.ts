/** The four areas of the bar, and what they are called in an address. */

export interface Area {
  readonly word: string;
  readonly href: string;
  /** First pieces of the addresses that belong to it. */
  readonly pages: readonly string[];
}

export const AREAS: readonly Area[] = [
  { word: 'Circuits', href: '/circuits', pages: ['/circuits', '/revisions', '/batches'] },
  { word: 'Stores', href: '/stores', pages: ['/stores', '/parts', '/bins', '/receive', '/counts'] },
  { word: 'Purchasing', href: '/purchasing', pages: ['/purchasing', '/shortfalls', '/orders', '/suppliers'] },
  { word: 'Workshop', href: '/workshop', pages: ['/workshop', '/people', '/ledger', '/settings', '/tokens'] },
];

/** Whether a page at `pathname` lies at or below `href`. */
export function isWithin(pathname: string, href: string): boolean {
  return pathname === href || pathname.startsWith(`${href}/`);
}
