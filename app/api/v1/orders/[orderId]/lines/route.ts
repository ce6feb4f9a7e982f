import { route } from '@/lib/api/route';
import { changeOrderLines } from '@/lib/purchasing/draft-order';

export const PUT = route(changeOrderLines);
