import { route } from '@/lib/api/route';
import { createToken, listTokens } from '@/lib/workshop/api-tokens';

export const GET = route(listTokens);
export const POST = route(createToken);
