import { route } from '@/lib/api/route';
import { sendOrder } from '@/lib/purchasing/send-order';

export const POST = route(sendOrder);
