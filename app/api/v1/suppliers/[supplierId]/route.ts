import { route } from '@/lib/api/route';
import { changeSupplier } from '@/lib/purchasing/suppliers';

export const PUT = route(changeSupplier);
