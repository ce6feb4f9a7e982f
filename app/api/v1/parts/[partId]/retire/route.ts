import { route } from '@/lib/api/route';
import { retirePart } from '@/lib/stores/retire-part';

export const POST = route(retirePart);
