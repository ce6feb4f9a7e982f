import { route } from '@/lib/api/route';
import { freezeRevision } from '@/lib/circuits/freeze-revision';

export const POST = route(freezeRevision);
