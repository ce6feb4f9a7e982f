/** A safety notice, shown where the work is: mains, polarity, ESD, fume, cells. Says why, and who decides. */
import type { ReactNode } from 'react';
import { Glyph } from './glyph';

/**
 * `danger` for what can hurt or burn (mains, fuses, isolation, lithium cells), `care` for what spoils a part or a
 * reading (polarity, ESD). Bars left and right, so that it is told from a Notice in black and white print too.
 */
export function Caution({
  level = 'care',
  title,
  children,
}: {
  readonly level?: 'care' | 'danger';
  readonly title: string;
  readonly children?: ReactNode;
}) {
  const ink = level === 'danger' ? 'text-oxide' : 'text-amber';
  const bars = level === 'danger' ? 'border-oxide' : 'border-amber';
  return (
    <aside aria-label={`Caution: ${title}`} className={`flex gap-2.5 border-x-4 px-3 py-1.5 ${bars}`}>
      <Glyph name="look" size={18} className={`mt-px ${ink}`} />
      <div className="min-w-0">
        <p className={`font-semibold ${ink}`}>{title}</p>
        {children !== undefined ? <div className="text-small">{children}</div> : null}
      </div>
    </aside>
  );
}
