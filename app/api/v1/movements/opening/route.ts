import { route } from '@/lib/api/route';
import { openingStock } from '@/lib/stores/move-stock';

export const POST = route(openingStock);
