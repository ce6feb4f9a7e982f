import { route } from '@/lib/api/route';
import { changeColumnRole } from '@/lib/circuits/change-column-role';

export const POST = route(changeColumnRole);
