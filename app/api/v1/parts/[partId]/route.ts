import { route } from '@/lib/api/route';
import { changePart } from '@/lib/stores/change-part';
import { getPart } from '@/lib/stores/get-part';

export const GET = route(getPart);
export const PATCH = route(changePart);
