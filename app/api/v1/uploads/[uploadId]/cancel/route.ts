import { route } from '@/lib/api/route';
import { cancelReading } from '@/lib/circuits/get-upload';

export const POST = route(cancelReading);
