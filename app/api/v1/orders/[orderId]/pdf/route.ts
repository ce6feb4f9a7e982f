import { route } from '@/lib/api/route';
import { orderAsPdf } from '@/lib/purchasing/send-order';

export const GET = route(orderAsPdf);
