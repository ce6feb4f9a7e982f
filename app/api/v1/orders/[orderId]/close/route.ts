import { route } from '@/lib/api/route';
import { closeOrder } from '@/lib/purchasing/pay-order';

export const POST = route(closeOrder);
