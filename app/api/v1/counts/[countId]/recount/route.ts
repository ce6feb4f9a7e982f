import { route } from '@/lib/api/route';
import { recountEntries } from '@/lib/stores/recount-entries';

export const POST = route(recountEntries);
