import { route } from '@/lib/api/route';
import { listReceipts } from '@/lib/stores/list-receipts';
import { receiveDelivery } from '@/lib/stores/receive-delivery';

export const GET = route(listReceipts);
export const POST = route(receiveDelivery);
