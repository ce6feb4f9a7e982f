import { route } from '@/lib/api/route';
import { scrapStock } from '@/lib/stores/move-stock';

export const POST = route(scrapStock);
