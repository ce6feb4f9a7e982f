import { route } from '@/lib/api/route';
import { returnOrderToDraft } from '@/lib/purchasing/approve-order';

export const POST = route(returnOrderToDraft);
