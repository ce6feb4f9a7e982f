import { route } from '@/lib/api/route';
import { createRevision } from '@/lib/circuits/create-revision';

export const POST = route(createRevision);
