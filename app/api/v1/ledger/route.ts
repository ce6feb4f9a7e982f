import { route } from '@/lib/api/route';
import { listMovements } from '@/lib/stores/list-movements';

export const GET = route(listMovements);
