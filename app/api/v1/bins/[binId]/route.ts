import { route } from '@/lib/api/route';
import { getBin } from '@/lib/stores/get-bin';

export const GET = route(getBin);
