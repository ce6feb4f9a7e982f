import { route } from '@/lib/api/route';
import { getUpload } from '@/lib/circuits/get-upload';

export const GET = route(getUpload);
