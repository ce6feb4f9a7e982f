import { route } from '@/lib/api/route';
import { reserveBatch } from '@/lib/stores/reserve-batch';

export const POST = route(reserveBatch);
