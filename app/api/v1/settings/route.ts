import { route } from '@/lib/api/route';
import { changeSettings, getSettings } from '@/lib/workshop/settings';

export const GET = route(getSettings);
export const PATCH = route(changeSettings);
