/** The pages of the Circuits area. */
import type { AreaLink } from '@/components/shell/area-links';

export const CIRCUITS_LINKS: readonly AreaLink[] = [
  { word: 'Circuits', href: '/circuits' },
  { word: 'Batches', href: '/batches' },
];
