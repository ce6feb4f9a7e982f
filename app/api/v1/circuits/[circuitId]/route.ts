import { route } from '@/lib/api/route';
import { changeCircuit } from '@/lib/circuits/change-circuit';
import { getCircuit } from '@/lib/circuits/get-circuit';

export const GET = route(getCircuit);
export const PATCH = route(changeCircuit);
