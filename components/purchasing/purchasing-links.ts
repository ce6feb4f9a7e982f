/** The pages of the Purchasing area. */
import type { AreaLink } from '@/components/shell/area-links';

export const PURCHASING_LINKS: readonly AreaLink[] = [
  { word: 'Shortfalls', href: '/shortfalls' },
  { word: 'Orders', href: '/orders' },
  { word: 'Suppliers', href: '/suppliers' },
];
