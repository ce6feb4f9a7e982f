import { route } from '@/lib/api/route';
import { getCount } from '@/lib/stores/read-counts';

export const GET = route(getCount);
