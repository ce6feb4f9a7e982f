import { route } from '@/lib/api/route';
import { exportRevision } from '@/lib/circuits/export-revision';

export const GET = route(exportRevision);
