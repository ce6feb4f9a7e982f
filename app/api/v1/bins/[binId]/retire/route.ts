import { route } from '@/lib/api/route';
import { retireBin } from '@/lib/stores/bins';

export const POST = route(retireBin);
