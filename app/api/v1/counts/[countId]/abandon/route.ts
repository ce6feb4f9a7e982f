import { route } from '@/lib/api/route';
import { abandonCount } from '@/lib/stores/count-bins';

export const POST = route(abandonCount);
