import { route } from '@/lib/api/route';
import { getBatch } from '@/lib/stores/get-batch';

export const GET = route(getBatch);
