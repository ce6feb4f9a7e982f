import { route } from '@/lib/api/route';
import { listLots } from '@/lib/stores/list-lots';

export const GET = route(listLots);
