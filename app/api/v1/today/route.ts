import { route } from '@/lib/api/route';
import { whatWaits } from '@/lib/workshop/what-waits';

export const GET = route(whatWaits);
