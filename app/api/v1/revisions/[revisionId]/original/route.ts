import { route } from '@/lib/api/route';
import { originalOfRevision } from '@/lib/circuits/original-of-revision';

export const GET = route(originalOfRevision);
