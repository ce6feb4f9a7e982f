import { route } from '@/lib/api/route';
import { receiptProposal } from '@/lib/stores/read-receipts';

export const GET = route(receiptProposal);
