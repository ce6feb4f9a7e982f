'use client';
/** A code with a button that copies it (an order number, a token shown once). Client: it writes to the clipboard. */
import { useEffect, useState } from 'react';
import { Glyph } from './glyph';

export function CopyText({ text, label }: { readonly text: string; readonly label: string }) {
  const [state, setState] = useState<'still' | 'copied' | 'failed'>('still');
  useEffect(() => {
    if (state === 'still') return undefined;
    const timer = setTimeout(() => setState('still'), 2500);
    return () => clearTimeout(timer);
  }, [state]);

  async function copy() {
    try {
      await navigator.clipboard.writeText(text);
      setState('copied');
    } catch {
      // Refused by the browser (no permission, or the page is not served over https): the text stays selectable.
      setState('failed');
    }
  }

  return (
    <span className="inline-flex max-w-full items-center gap-2">
      <code className="min-w-0 font-mono break-all select-all">{text}</code>
      <button
        type="button"
        onClick={() => void copy()}
        aria-label={`Copy ${label}`}
        className="inline-flex size-8 shrink-0 items-center justify-center text-copper hover:bg-copper-wash max-sm:size-11"
      >
        <Glyph name={state === 'copied' ? 'same' : 'copy'} />
      </button>
      <span role="status" className="text-fine text-soft">
        {state === 'copied' ? 'copied' : state === 'failed' ? 'select it and copy by hand' : ''}
      </span>
    </span>
  );
}
