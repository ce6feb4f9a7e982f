/** Nothing here yet: says what would stand here, and what to do next. */
import type { ReactNode } from 'react';

export function EmptyState({
  title,
  children,
  actions,
}: {
  readonly title: ReactNode;
  readonly children?: ReactNode;
  readonly actions?: ReactNode;
}) {
  return (
    <div className="border-y border-rule py-8">
      <p className="text-lead font-semibold">{title}</p>
      {children !== undefined ? <div className="mt-1 max-w-prose text-soft">{children}</div> : null}
      {actions !== undefined ? <div className="mt-4 flex flex-wrap gap-3">{actions}</div> : null}
    </div>
  );
}
