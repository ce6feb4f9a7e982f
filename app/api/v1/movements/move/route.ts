import { route } from '@/lib/api/route';
import { moveStock } from '@/lib/stores/move-stock';

export const POST = route(moveStock);
