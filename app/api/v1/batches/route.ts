import { route } from '@/lib/api/route';
import { createBatch } from '@/lib/stores/create-batch';
import { listBatches } from '@/lib/stores/list-batches';

export const GET = route(listBatches);
export const POST = route(createBatch);
