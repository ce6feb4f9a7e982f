import { route } from '@/lib/api/route';
import { lineCandidates } from '@/lib/circuits/line-candidates';

export const GET = route(lineCandidates);
