/** One line of a batch as the screens take it. */
import type { z } from 'zod';
import type { getBatch } from '@/lib/stores/get-batch';

export type BatchNeed = z.output<typeof getBatch.output>['needsList'][number];
