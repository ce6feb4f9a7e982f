import { route } from '@/lib/api/route';
import { enterCounts } from '@/lib/stores/enter-counts';

export const POST = route(enterCounts);
