import { route } from '@/lib/api/route';
import { cancelBatch } from '@/lib/stores/finish-batch';

export const POST = route(cancelBatch);
