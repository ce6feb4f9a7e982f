import { route } from '@/lib/api/route';
import { openCount } from '@/lib/stores/count-bins';
import { listCounts } from '@/lib/stores/read-counts';

export const GET = route(listCounts);
export const POST = route(openCount);
