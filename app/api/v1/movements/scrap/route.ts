import { route } from '@/lib/api/route';
import { scrapStock } from '@/lib/stores/scrap-stock';

export const POST = route(scrapStock);
