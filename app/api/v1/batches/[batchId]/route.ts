import { route } from '@/lib/api/route';
import { getBatch } from '@/lib/stores/read-batches';

export const GET = route(getBatch);
