/** Every use case of this area; lib/registry.ts joins the areas for the API description and the authorisation matrix. */
import type { UseCase } from '@/lib/api/use-case';
import { createCircuit } from './create-circuit';
import { listCircuits } from './list-circuits';

export const circuitsUseCases: readonly UseCase[] = [createCircuit, listCircuits];
