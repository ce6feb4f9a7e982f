'use client';
/** A page that failed. Client: Next asks for it. The cause is in the server's log under the number shown, not here. */
import { Button } from '@/components/ui/button';

export default function PageError({
  error,
  reset,
}: {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}) {
  return (
    <main className="mx-auto max-w-xl px-4 py-16">
      <h1 className="text-title font-bold">This page could not be shown</h1>
      <p role="alert" className="mt-2 text-soft">
        Something failed on our side. What was saved before is kept; what was being sent may not have arrived, so look
        before you send it again.
      </p>
      {error.digest === undefined ? null : (
        <p className="mt-3 text-small text-soft">
          Number for whoever looks after this workshop’s server:{' '}
          <code className="font-mono text-ink select-all">{error.digest}</code>
        </p>
      )}
      <div className="mt-6 flex flex-wrap gap-3">
        <Button kind="primary" onClick={reset}>
          Try again
        </Button>
      </div>
    </main>
  );
}
