/** The demo is made the way people would make it: through the use cases, each as the person whose job it is. */
import type { z } from 'zod';
import { newId } from '@/db/schema/new-id';
import { perform } from '@/lib/api/perform';
import type { UseCase } from '@/lib/api/use-case';
import type { Role } from '@/lib/auth/actor';
import type { Credentials } from '@/lib/auth/load-actor';

export type People = Readonly<Record<Role, Credentials>>;

export async function as<U extends UseCase>(
  credentials: Credentials,
  useCase: U,
  input: z.input<U['input']>,
): Promise<z.output<U['output']>> {
  const { output } = await perform(useCase, { credentials, input, requestId: newId(), idempotencyKey: null });
  return output;
}
