import { route } from '@/lib/api/route';
import { withdrawInvitation } from '@/lib/workshop/invite-person';

export const POST = route(withdrawInvitation);
