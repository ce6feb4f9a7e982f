import { route } from '@/lib/api/route';
import { listBins } from '@/lib/stores/bins';

export const GET = route(listBins);
