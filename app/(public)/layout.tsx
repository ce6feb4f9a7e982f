import type { ReactNode } from 'react';
import { QueryProvider } from '@/components/workshop/query-provider';

/** Pages for who is not signed in: one narrow sheet on the bench. */
export default function PublicLayout({ children }: { readonly children: ReactNode }) {
  return (
    <QueryProvider>
      <main className="mx-auto w-full max-w-[26rem] px-4 py-10 sm:py-20">{children}</main>
    </QueryProvider>
  );
}
