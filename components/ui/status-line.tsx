'use client';
/**
 * One line at the foot of the page that says what has just happened, and says it to screen readers too. Client: it
 * listens for messages. Nothing that must not be missed goes here; that is a Notice.
 */
import { createContext, useCallback, useContext, useEffect, useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import { Glyph } from './glyph';

export interface StatusMessage {
  readonly text: string;
  readonly tone?: 'good' | 'look' | 'stop';
  /** A way back, such as undoing a move with its opposite. */
  readonly action?: { readonly word: string; readonly run: () => void };
}

type Say = (message: StatusMessage | string) => void;

const Saying = createContext<Say | null>(null);

/** Says something in the status line; does nothing outside a provider, so that a component can be tried alone. */
export function useSay(): Say {
  const say = useContext(Saying);
  return useMemo(() => say ?? (() => undefined), [say]);
}

const SHOWN_MS = 7000;

export function StatusProvider({ children }: { readonly children: ReactNode }) {
  const [shown, setShown] = useState<{ readonly message: StatusMessage; readonly count: number } | null>(null);
  const say = useCallback<Say>((message) => {
    const whole = typeof message === 'string' ? { text: message } : message;
    setShown((before) => ({ message: whole, count: (before?.count ?? 0) + 1 }));
  }, []);
  useEffect(() => {
    // A message with an action waits until it is dismissed: WCAG 2.2.1 allows no time limit on what can be acted on.
    if (shown === null || shown.message.action !== undefined) return undefined;
    const timer = setTimeout(() => setShown(null), SHOWN_MS);
    return () => clearTimeout(timer);
  }, [shown]);
  return (
    <Saying.Provider value={say}>
      {children}
      <StatusLine message={shown?.message ?? null} onDismiss={() => setShown(null)} />
    </Saying.Provider>
  );
}

export function StatusLine({
  message,
  onDismiss,
}: {
  readonly message: StatusMessage | null;
  readonly onDismiss: () => void;
}) {
  const glyph = { good: 'same', look: 'look', stop: 'refused' } as const;
  const ink = { good: 'text-mask', look: 'text-amber', stop: 'text-oxide' } as const;
  const tone = message?.tone ?? 'good';
  return (
    // The live region is there from the start: one that arrives together with its text is not announced.
    <div
      role="status"
      className="pointer-events-none fixed inset-x-0 bottom-0 z-40 flex justify-center p-3 print:hidden"
    >
      {message === null ? null : (
        <div className="pointer-events-auto flex max-w-xl items-center gap-2.5 border border-ink bg-sheet py-1.5 pr-1.5 pl-3.5">
          <Glyph name={glyph[tone]} className={ink[tone]} />
          <span className="min-w-0">{message.text}</span>
          {message.action === undefined ? null : (
            <button
              type="button"
              className="px-2 py-1 font-semibold text-copper hover:bg-copper-wash"
              onClick={() => {
                message.action?.run();
                onDismiss();
              }}
            >
              {message.action.word}
            </button>
          )}
          <button
            type="button"
            aria-label="Dismiss"
            onClick={onDismiss}
            className="inline-flex size-8 items-center justify-center hover:bg-hair max-sm:size-11"
          >
            <Glyph name="close" size={13} />
          </button>
        </div>
      )}
    </div>
  );
}
