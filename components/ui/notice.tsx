/** A message that stays in the page: what happened, what was kept, what to do. */
import type { ReactNode } from 'react';
import { Glyph, type GlyphName } from './glyph';

export type NoticeTone = 'good' | 'look' | 'stop' | 'plain';

const TONES: Readonly<
  Record<NoticeTone, { readonly box: string; readonly ink: string; readonly glyph: GlyphName; readonly spoken: string }>
> = {
  good: { box: 'border-mask bg-mask-wash', ink: 'text-mask', glyph: 'same', spoken: 'Good:' },
  look: { box: 'border-amber bg-amber-wash', ink: 'text-amber', glyph: 'look', spoken: 'Look:' },
  stop: { box: 'border-oxide bg-oxide-wash', ink: 'text-oxide', glyph: 'refused', spoken: 'Stop:' },
  plain: { box: 'border-rule bg-sheet', ink: 'text-soft', glyph: 'note', spoken: '' },
};

/** `announce` where it appears after the page was read: a stop interrupts, the others wait for a pause. */
export function Notice({
  tone,
  title,
  children,
  actions,
  announce = false,
}: {
  readonly tone: NoticeTone;
  readonly title?: ReactNode;
  readonly children?: ReactNode;
  readonly actions?: ReactNode;
  readonly announce?: boolean;
}) {
  const look = TONES[tone];
  return (
    <div
      role={announce ? (tone === 'stop' ? 'alert' : 'status') : undefined}
      className={`flex gap-2.5 border px-3.5 py-2.5 ${look.box}`}
    >
      <Glyph name={look.glyph} size={17} className={`mt-0.5 ${look.ink}`} />
      <div className="min-w-0 flex-1">
        {look.spoken === '' ? null : <span className="sr-only">{look.spoken} </span>}
        {title !== undefined ? <p className={`font-semibold ${look.ink}`}>{title}</p> : null}
        {children !== undefined ? <div className="text-ink">{children}</div> : null}
        {actions !== undefined ? <div className="mt-2.5 flex flex-wrap gap-2.5">{actions}</div> : null}
      </div>
    </div>
  );
}
