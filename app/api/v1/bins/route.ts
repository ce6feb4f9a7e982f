import { route } from '@/lib/api/route';
import { createBins } from '@/lib/stores/create-bins';
import { listBins } from '@/lib/stores/list-bins';

export const GET = route(listBins);
export const POST = route(createBins);
