import { route } from '@/lib/api/route';
import { listOffers } from '@/lib/purchasing/suppliers';

export const GET = route(listOffers);
