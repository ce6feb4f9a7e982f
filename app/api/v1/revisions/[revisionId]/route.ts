import { route } from '@/lib/api/route';
import { getRevision } from '@/lib/circuits/get-revision';

export const GET = route(getRevision);
