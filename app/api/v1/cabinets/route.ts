import { route } from '@/lib/api/route';
import { createCabinet } from '@/lib/stores/create-cabinet';
import { listCabinets } from '@/lib/stores/list-cabinets';

export const GET = route(listCabinets);
export const POST = route(createCabinet);
