import { route } from '@/lib/api/route';
import { enterCounts } from '@/lib/stores/count-bins';

export const POST = route(enterCounts);
