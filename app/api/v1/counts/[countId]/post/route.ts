import { route } from '@/lib/api/route';
import { postCount } from '@/lib/stores/post-count';

export const POST = route(postCount);
