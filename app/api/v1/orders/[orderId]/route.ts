import { route } from '@/lib/api/route';
import { getOrder } from '@/lib/purchasing/get-order';

export const GET = route(getOrder);
