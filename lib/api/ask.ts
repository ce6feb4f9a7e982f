/** A query asked by a server component: the same definition and authorisation as the route, without the HTTP. */
import 'server-only';
import { forbidden, notFound, redirect } from 'next/navigation';
import type { z } from 'zod';
import { credentialsOfPage } from '@/lib/auth/credentials';
import { newRequestId, perform } from './perform';
import { Refusal } from './problem';
import type { Endpoint, Query } from './use-case';

/** Signed out leads to the sign-in page, a missing thing to "not found"; other refusals reach the error page. */
export async function ask<In extends z.ZodType, Out extends z.ZodType>(
  useCase: Query<string, Endpoint, In, Out>,
  input: z.input<In>,
): Promise<z.output<Out>> {
  const credentials = await credentialsOfPage();
  if (!credentials) redirect('/sign-in');
  try {
    const { output } = await perform(useCase, { credentials, input, requestId: newRequestId(), idempotencyKey: null });
    return output as z.output<Out>;
  } catch (error) {
    if (error instanceof Refusal) {
      if (error.code === 'signed-out') redirect('/sign-in');
      // What an address names in a form that nothing has is as little there as what it names by an unknown id.
      if (error.code === 'not-found' || error.code === 'input.invalid') notFound();
      if (error.code === 'not-allowed') forbidden();
    }
    throw error;
  }
}
