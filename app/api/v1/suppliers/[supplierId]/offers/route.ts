import { route } from '@/lib/api/route';
import { setOffer } from '@/lib/purchasing/suppliers';

export const PUT = route(setOffer);
