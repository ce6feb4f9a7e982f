/** The pages of the Stores area. */
import type { AreaLink } from '@/components/shell/area-links';

export const STORES_LINKS: readonly AreaLink[] = [
  { word: 'Parts', href: '/parts' },
  { word: 'Bins', href: '/bins' },
  { word: 'Receive', href: '/receive' },
  { word: 'Counts', href: '/counts' },
];
