import { route } from '@/lib/api/route';
import { cancelOrder } from '@/lib/purchasing/cancel-order';

export const POST = route(cancelOrder);
