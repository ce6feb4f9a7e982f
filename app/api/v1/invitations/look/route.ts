import { route } from '@/lib/api/route';
import { lookAtInvitation } from '@/lib/workshop/invite-person';

export const POST = route(lookAtInvitation);
