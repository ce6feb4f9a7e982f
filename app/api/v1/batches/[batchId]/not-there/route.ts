import { route } from '@/lib/api/route';
import { missingAtPick } from '@/lib/stores/pick-batch';

export const POST = route(missingAtPick);
