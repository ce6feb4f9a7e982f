import { route } from '@/lib/api/route';
import { decideLine } from '@/lib/circuits/decide-line';

export const POST = route(decideLine);
