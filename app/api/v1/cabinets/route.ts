import { route } from '@/lib/api/route';
import { createCabinet, listCabinets } from '@/lib/stores/bins';

export const GET = route(listCabinets);
export const POST = route(createCabinet);
