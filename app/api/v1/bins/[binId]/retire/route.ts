import { route } from '@/lib/api/route';
import { retireBin } from '@/lib/stores/retire-bin';

export const POST = route(retireBin);
