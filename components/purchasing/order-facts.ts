/** An order as the screens take it. */
import type { z } from 'zod';
import type { getOrder } from '@/lib/purchasing/get-order';

export type OrderFacts = z.output<typeof getOrder.output>;
