import { route } from '@/lib/api/route';
import { openingStock } from '@/lib/stores/opening-stock';

export const POST = route(openingStock);
