import { route } from '@/lib/api/route';
import { getCount } from '@/lib/stores/get-count';

export const GET = route(getCount);
