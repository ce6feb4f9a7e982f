import { route } from '@/lib/api/route';
import { abandonCount } from '@/lib/stores/abandon-count';

export const POST = route(abandonCount);
