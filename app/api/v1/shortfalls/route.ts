import { route } from '@/lib/api/route';
import { listShortfalls } from '@/lib/purchasing/shortfalls';

export const GET = route(listShortfalls);
