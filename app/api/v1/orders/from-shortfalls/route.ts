import { route } from '@/lib/api/route';
import { orderShortfalls } from '@/lib/purchasing/order-shortfalls';

export const POST = route(orderShortfalls);
