import { route } from '@/lib/api/route';
import { compareRevisions } from '@/lib/circuits/compare-revisions';

export const GET = route(compareRevisions);
