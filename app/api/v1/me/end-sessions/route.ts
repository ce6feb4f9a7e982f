import { route } from '@/lib/api/route';
import { endMySessions } from '@/lib/workshop/who-am-i';

export const POST = route(endMySessions);
