import { route } from '@/lib/api/route';
import { pickList } from '@/lib/stores/read-batches';

export const GET = route(pickList);
