import { route } from '@/lib/api/route';
import { revokeToken } from '@/lib/workshop/api-tokens';

export const POST = route(revokeToken);
