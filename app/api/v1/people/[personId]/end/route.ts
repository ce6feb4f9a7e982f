import { route } from '@/lib/api/route';
import { endMembership } from '@/lib/workshop/change-roles';

export const POST = route(endMembership);
