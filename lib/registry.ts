/** All use cases: what the API description, the authorisation matrix and the route check are derived from. */
import type { UseCase } from './api/use-case';
import { circuitsUseCases } from './circuits/use-cases';
import { purchasingUseCases } from './purchasing/use-cases';
import { storesUseCases } from './stores/use-cases';
import { workshopUseCases } from './workshop/use-cases';

export const useCases: readonly UseCase[] = [
  ...circuitsUseCases,
  ...storesUseCases,
  ...purchasingUseCases,
  ...workshopUseCases,
];
