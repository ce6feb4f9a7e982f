import { route } from '@/lib/api/route';
import { listLots } from '@/lib/stores/read-ledger';

export const GET = route(listLots);
