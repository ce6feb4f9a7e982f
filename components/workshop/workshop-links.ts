/** The pages of the Workshop area. */
import type { AreaLink } from '@/components/shell/area-links';

export const WORKSHOP_LINKS: readonly AreaLink[] = [
  { word: 'People', href: '/people' },
  { word: 'Ledger', href: '/ledger' },
  { word: 'Settings', href: '/settings' },
  { word: 'API tokens', href: '/tokens' },
];
