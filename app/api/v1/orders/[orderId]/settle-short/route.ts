import { route } from '@/lib/api/route';
import { settleShortOrder } from '@/lib/purchasing/cancel-order';

export const POST = route(settleShortOrder);
