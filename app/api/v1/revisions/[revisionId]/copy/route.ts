import { route } from '@/lib/api/route';
import { copyRevision } from '@/lib/circuits/copy-revision';

export const POST = route(copyRevision);
