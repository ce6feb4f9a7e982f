import { route } from '@/lib/api/route';
import { assessPart } from '@/lib/circuits/assess-part';

export const POST = route(assessPart);
