import { route } from '@/lib/api/route';
import { listPeople } from '@/lib/workshop/list-people';

export const GET = route(listPeople);
