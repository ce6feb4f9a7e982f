import { route } from '@/lib/api/route';
import { orderAsCsv } from '@/lib/purchasing/send-order';

export const GET = route(orderAsCsv);
