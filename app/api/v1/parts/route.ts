import { route } from '@/lib/api/route';
import { createPart } from '@/lib/stores/create-part';
import { listParts } from '@/lib/stores/list-parts';

export const GET = route(listParts);
export const POST = route(createPart);
