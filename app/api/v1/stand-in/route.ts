import { route } from '@/lib/api/route';
import { standIn } from '@/lib/circuits/stand-in';

export const GET = route(standIn);
