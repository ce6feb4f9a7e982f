import { route } from '@/lib/api/route';
import { takeRowAsLine } from '@/lib/circuits/take-row';

export const POST = route(takeRowAsLine);
