import { route } from '@/lib/api/route';
import { changeRoles } from '@/lib/workshop/change-roles';

export const POST = route(changeRoles);
