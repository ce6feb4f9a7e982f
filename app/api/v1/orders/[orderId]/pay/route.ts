import { route } from '@/lib/api/route';
import { payOrder } from '@/lib/purchasing/pay-order';

export const POST = route(payOrder);
