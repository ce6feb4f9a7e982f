import { route } from '@/lib/api/route';
import { listLines } from '@/lib/circuits/list-lines';

export const GET = route(listLines);
