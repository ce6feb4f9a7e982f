import { route } from '@/lib/api/route';
import { completeKit } from '@/lib/stores/complete-kit';

export const POST = route(completeKit);
