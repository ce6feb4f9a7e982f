import { route } from '@/lib/api/route';
import { createSupplier, listSuppliers } from '@/lib/purchasing/suppliers';

export const GET = route(listSuppliers);
export const POST = route(createSupplier);
