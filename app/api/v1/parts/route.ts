import { route } from '@/lib/api/route';
import { createPart, listParts } from '@/lib/stores/parts';

export const GET = route(listParts);
export const POST = route(createPart);
