/** What stands round every page of a workshop: the way past the bar, the bar, a banner, the page, the status line. */
import type { ReactNode } from 'react';
import { StatusProvider } from '@/components/ui/status-line';
import { TopBar, type TopBarProps } from './top-bar';

export function WorkshopShell({
  banner,
  children,
  ...bar
}: TopBarProps & { readonly banner?: ReactNode; readonly children: ReactNode }) {
  return (
    <StatusProvider>
      <a
        href="#page"
        className="absolute top-0 left-0 z-50 -translate-y-full bg-ink px-4 py-2 font-semibold text-paper focus:translate-y-0 print:hidden"
      >
        To the page
      </a>
      <TopBar {...bar} />
      {banner === undefined || banner === null ? null : <Banner>{banner}</Banner>}
      <main
        id="page"
        tabIndex={-1}
        className="mx-auto max-w-[1760px] px-6.5 pt-5 pb-24 outline-none max-sm:px-4 max-sm:pt-4 print:p-0"
      >
        {children}
      </main>
    </StatusProvider>
  );
}

/** A line under the bar that holds for all pages: "Local stand-ins: no money moves". */
export function Banner({ children }: { readonly children: ReactNode }) {
  return (
    <aside
      aria-label="About this installation"
      className="border-b border-rule bg-amber-wash px-6.5 py-1 text-small text-amber max-sm:px-4 print:hidden"
    >
      {children}
    </aside>
  );
}
