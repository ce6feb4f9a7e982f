/** A part of a page with its heading, and the raised sheet for an argument that stands beside the work. */
import { useId } from 'react';
import type { ReactNode } from 'react';

export function Section({
  title,
  remainder,
  actions,
  level = 2,
  children,
}: {
  readonly title: ReactNode;
  readonly remainder?: ReactNode;
  readonly actions?: ReactNode;
  readonly level?: 2 | 3;
  readonly children: ReactNode;
}) {
  const id = useId();
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <section aria-labelledby={id} className="mt-7 first:mt-0">
      <div className="mb-2.5 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2">
        <Heading id={id} className={level === 2 ? 'text-lead font-bold' : 'text-body font-bold'}>
          {title}
          {remainder !== undefined ? <span className="font-normal text-soft"> {remainder}</span> : null}
        </Heading>
        {actions !== undefined ? <div className="flex flex-wrap gap-2.5 print:hidden">{actions}</div> : null}
      </div>
      {children}
    </section>
  );
}

/** The one bounded surface: a stand-in's argument, a phone's task. Never inside another. `edge` ink for what is at work now. */
export function Sheet({
  title,
  aside,
  edge = 'ink',
  children,
}: {
  readonly title?: ReactNode;
  readonly aside?: ReactNode;
  readonly edge?: 'ink' | 'rule' | 'dashed';
  readonly children: ReactNode;
}) {
  const id = useId();
  const border = { ink: 'border-ink', rule: 'border-rule', dashed: 'border-dashed border-soft' }[edge];
  return (
    <section
      aria-labelledby={title === undefined ? undefined : id}
      className={`min-w-0 border bg-sheet p-5 max-sm:p-4 ${border}`}
    >
      {title !== undefined ? (
        <div className="mb-3 flex items-baseline justify-between gap-4">
          <h2 id={id} className="text-heading font-bold">
            {title}
          </h2>
          {aside !== undefined ? <div className="text-soft">{aside}</div> : null}
        </div>
      ) : null}
      {children}
    </section>
  );
}

/** The work at the left, its argument at the right; one under the other on a narrow screen. */
export function Beside({ children, beside }: { readonly children: ReactNode; readonly beside: ReactNode }) {
  return (
    <div className="grid grid-cols-1 items-start gap-5 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,27rem)]">
      <div className="min-w-0">{children}</div>
      <div className="min-w-0 lg:sticky lg:top-4">{beside}</div>
    </div>
  );
}
