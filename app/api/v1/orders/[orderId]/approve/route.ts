import { route } from '@/lib/api/route';
import { approveOrder } from '@/lib/purchasing/approve-order';

export const POST = route(approveOrder);
