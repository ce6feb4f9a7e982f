import { route } from '@/lib/api/route';
import { changeLine } from '@/lib/circuits/change-line';
import { dropLine } from '@/lib/circuits/drop-line';

export const PATCH = route(changeLine);
export const DELETE = route(dropLine);
