import { route } from '@/lib/api/route';
import { pickBatch } from '@/lib/stores/pick-batch';

export const POST = route(pickBatch);
