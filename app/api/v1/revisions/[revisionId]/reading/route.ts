import { route } from '@/lib/api/route';
import { readingOfRevision } from '@/lib/circuits/get-reading';

export const GET = route(readingOfRevision);
