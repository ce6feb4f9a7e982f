import { route } from '@/lib/api/route';
import { submitOrder } from '@/lib/purchasing/approve-order';

export const POST = route(submitOrder);
