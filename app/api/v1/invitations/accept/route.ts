import { route } from '@/lib/api/route';
import { acceptInvitation } from '@/lib/workshop/invite-person';

export const POST = route(acceptInvitation);
