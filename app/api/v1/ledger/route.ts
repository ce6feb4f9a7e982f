import { route } from '@/lib/api/route';
import { listMovements } from '@/lib/stores/read-ledger';

export const GET = route(listMovements);
