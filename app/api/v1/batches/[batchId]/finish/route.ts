import { route } from '@/lib/api/route';
import { finishBatch } from '@/lib/stores/finish-batch';

export const POST = route(finishBatch);
