import { route } from '@/lib/api/route';
import { giveUpPayment } from '@/lib/purchasing/pay-order';

export const POST = route(giveUpPayment);
