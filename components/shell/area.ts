/** The four areas of the bar, and what they are called in an address. */

export interface Area {
  readonly word: string;
  readonly href: string;
}

export const AREAS: readonly Area[] = [
  { word: 'Circuits', href: '/circuits' },
  { word: 'Stores', href: '/stores' },
  { word: 'Purchasing', href: '/purchasing' },
  { word: 'Workshop', href: '/workshop' },
];

/** Whether a page at `pathname` lies at or below `href`. */
export function isWithin(pathname: string, href: string): boolean {
  return pathname === href || pathname.startsWith(`${href}/`);
}
