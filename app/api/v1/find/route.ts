import { route } from '@/lib/api/route';
import { findAnything } from '@/lib/stores/find-anything';

export const GET = route(findAnything);
