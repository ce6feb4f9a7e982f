import { route } from '@/lib/api/route';
import { askForPasswordReset } from '@/lib/workshop/ask-for-link';

export const POST = route(askForPasswordReset);
