import { route } from '@/lib/api/route';
import { cancelBatch } from '@/lib/stores/cancel-batch';

export const POST = route(cancelBatch);
