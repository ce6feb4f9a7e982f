import { route } from '@/lib/api/route';
import { pickList } from '@/lib/stores/pick-list';

export const GET = route(pickList);
