import { route } from '@/lib/api/route';
import { invitePerson } from '@/lib/workshop/invite-person';

export const POST = route(invitePerson);
