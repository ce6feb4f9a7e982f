import { route } from '@/lib/api/route';
import { askForSignInLink } from '@/lib/workshop/ask-for-link';

export const POST = route(askForSignInLink);
