import { route } from '@/lib/api/route';
import { recountEntries } from '@/lib/stores/count-bins';

export const POST = route(recountEntries);
