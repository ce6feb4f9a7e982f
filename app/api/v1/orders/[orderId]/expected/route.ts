import { route } from '@/lib/api/route';
import { receiptProposal } from '@/lib/stores/receipt-proposal';

export const GET = route(receiptProposal);
