import { route } from '@/lib/api/route';
import { openCount } from '@/lib/stores/open-count';
import { listCounts } from '@/lib/stores/list-counts';

export const GET = route(listCounts);
export const POST = route(openCount);
