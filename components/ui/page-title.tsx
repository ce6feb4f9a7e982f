/** The head of a sheet: title with a soft remainder, one line of facts, and the actions at the right. */
import type { ReactNode } from 'react';

export function PageTitle({
  title,
  remainder,
  facts = [],
  actions,
  above,
}: {
  readonly title: ReactNode;
  /** Carries on from the title in soft ink: "revision C", "for what is short by 18 December". */
  readonly remainder?: ReactNode;
  readonly facts?: readonly ReactNode[];
  /** Buttons; the one that matters most last. */
  readonly actions?: ReactNode;
  /** The way back, or the area's links. */
  readonly above?: ReactNode;
}) {
  const shown = facts.filter((fact) => fact !== null && fact !== undefined && fact !== false);
  return (
    <header className="mb-4">
      {above}
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div className="min-w-0 max-w-full">
          <h1 className="text-title font-bold break-words">
            {title}
            {remainder !== undefined ? <span className="font-normal text-soft"> {remainder}</span> : null}
          </h1>
          {shown.length > 0 ? (
            <ul className="mt-1 flex flex-wrap gap-x-5.5 gap-y-0.5 text-soft">
              {shown.map((fact, index) => (
                // The facts of one title never change places.
                <li key={index}>{fact}</li>
              ))}
            </ul>
          ) : null}
        </div>
        {actions !== undefined ? (
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2 max-sm:w-full max-sm:gap-x-2.5 print:hidden">
            {actions}
          </div>
        ) : null}
      </div>
    </header>
  );
}

/** A figure or name inside a fact, in full ink: `<Strong mono>38</Strong> lines`. */
export function Strong({ mono = false, children }: { readonly mono?: boolean; readonly children: ReactNode }) {
  return <strong className={`font-semibold text-ink ${mono ? 'font-mono' : ''}`}>{children}</strong>;
}
