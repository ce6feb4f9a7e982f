import { route } from '@/lib/api/route';
import { changePart, getPart } from '@/lib/stores/parts';

export const GET = route(getPart);
export const PATCH = route(changePart);
