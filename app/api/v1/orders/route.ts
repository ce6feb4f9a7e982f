import { route } from '@/lib/api/route';
import { createOrder } from '@/lib/purchasing/draft-order';
import { listOrders } from '@/lib/purchasing/get-order';

export const GET = route(listOrders);
export const POST = route(createOrder);
