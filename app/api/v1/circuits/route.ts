import { route } from '@/lib/api/route';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { listCircuits } from '@/lib/circuits/list-circuits';

export const GET = route(listCircuits);
export const POST = route(createCircuit);
