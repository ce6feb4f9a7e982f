import { route } from '@/lib/api/route';
import { setPassword } from '@/lib/workshop/set-password';

export const POST = route(setPassword);
