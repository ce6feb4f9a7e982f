import { route } from '@/lib/api/route';
import { originalOfUpload } from '@/lib/circuits/original-of-revision';

export const GET = route(originalOfUpload);
