import { route } from '@/lib/api/route';
import { missingAtPick } from '@/lib/stores/missing-at-pick';

export const POST = route(missingAtPick);
