import { route } from '@/lib/api/route';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const GET = route(whoAmI);
