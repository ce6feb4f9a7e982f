'use client';
/**
 * The one field that takes anything: typed, pasted or scanned. `/` puts the focus here from anywhere. Client: it offers
 * suggestions while one types. Without script, and for a scanner's Enter, it is a plain form that goes to /find.
 */
import { useRouter } from 'next/navigation';
import { useEffect, useId, useRef, useState } from 'react';
import { Glyph } from '@/components/ui/glyph';
import { type FetchSuggestions, fetchSuggestions, type FindSuggestion } from './find-suggestion';

// A scanner's burst is over in less; a person's pause between letters is about this long.
const PAUSE_MS = 140;
const GROUP_SEPARATOR = '\u001d';

export function FindField({
  fetcher = fetchSuggestions,
  initial = '',
}: {
  readonly fetcher?: FetchSuggestions;
  readonly initial?: string;
}) {
  const router = useRouter();
  const input = useRef<HTMLInputElement>(null);
  const listId = useId();
  const [query, setQuery] = useState(initial);
  const [found, setFound] = useState<readonly FindSuggestion[]>([]);
  const [open, setOpen] = useState(false);
  const [active, setActive] = useState(-1);

  useEffect(() => {
    function onKey(event: KeyboardEvent) {
      if (event.key !== '/' || event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented) return;
      if (
        event.target instanceof HTMLElement &&
        event.target.closest('input, textarea, select, [contenteditable=true], [role=dialog]')
      )
        return;
      event.preventDefault();
      input.current?.focus();
      input.current?.select();
    }
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);

  useEffect(() => {
    const asked = query.trim();
    if (!open || asked === '') return undefined;
    const stop = new AbortController();
    const timer = setTimeout(() => {
      fetcher(asked, stop.signal).then(
        (items) => {
          if (stop.signal.aborted) return;
          setFound(items.slice(0, 8));
          setActive(-1);
        },
        // Aborted, or no network: the form still works, so there is nothing to say.
        () => setFound([]),
      );
    }, PAUSE_MS);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [query, open, fetcher]);

  const showing = open && query.trim() !== '' && found.length > 0;

  function goTo(href: string) {
    setOpen(false);
    setQuery('');
    input.current?.blur();
    router.push(href);
  }

  return (
    <form
      role="search"
      action="/find"
      method="get"
      className="relative w-full"
      onSubmit={(event) => {
        event.preventDefault();
        const chosen = found[active];
        if (showing && chosen !== undefined) goTo(chosen.href);
        else if (query.trim() !== '') goTo(`/find?q=${encodeURIComponent(query.trim())}`);
      }}
      onBlur={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget)) setOpen(false);
      }}
    >
      <Glyph
        name="scan"
        size={18}
        className="pointer-events-none absolute top-1/2 left-2.5 -translate-y-1/2 text-soft"
      />
      <input
        ref={input}
        type="search"
        name="q"
        value={query}
        role="combobox"
        aria-label="Type or scan anything: a part number, a value, a bin, a bag's label, an order, a circuit"
        aria-expanded={showing}
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={showing && active >= 0 ? `${listId}-${active}` : undefined}
        aria-keyshortcuts="/"
        autoComplete="off"
        autoCapitalize="off"
        autoCorrect="off"
        spellCheck={false}
        enterKeyHint="go"
        maxLength={400}
        placeholder="Type or scan anything"
        className="peer h-[34px] w-full border border-edge bg-sheet pr-9 pl-9 text-ink max-md:h-11 max-md:pr-2.5 max-sm:text-[1rem]"
        onChange={(event) => {
          setQuery(event.target.value);
          setActive(-1);
          setOpen(true);
        }}
        onFocus={() => setOpen(true)}
        onKeyDown={(event) => {
          if (event.key === ']' && event.ctrlKey) {
            // Keyboard-wedge scanners send the group separator of a two-dimensional label as Control-].
            event.preventDefault();
            const { selectionStart, selectionEnd, value } = event.currentTarget;
            setQuery(
              value.slice(0, selectionStart ?? value.length) +
                GROUP_SEPARATOR +
                value.slice(selectionEnd ?? value.length),
            );
          } else if (event.key === 'ArrowDown' && showing) {
            event.preventDefault();
            setActive((before) => (before + 1) % found.length);
          } else if (event.key === 'ArrowUp' && showing) {
            event.preventDefault();
            setActive((before) => (before <= 0 ? found.length - 1 : before - 1));
          } else if (event.key === 'Escape') {
            if (showing) setOpen(false);
            else if (query !== '') setQuery('');
            else event.currentTarget.blur();
            event.preventDefault();
          }
        }}
      />
      <kbd
        aria-hidden
        className="pointer-events-none absolute top-1/2 right-2.5 -translate-y-1/2 border border-rule px-1.5 font-mono text-fine text-soft peer-focus:hidden max-md:hidden"
      >
        /
      </kbd>
      <ul
        id={listId}
        role="listbox"
        aria-label="Recognised"
        hidden={!showing}
        className="absolute inset-x-0 top-full z-40 mt-px max-h-[70dvh] overflow-y-auto border border-ink bg-sheet"
      >
        {found.map((item, index) => (
          <li
            key={`${item.kind} ${item.href} ${item.label}`}
            id={`${listId}-${index}`}
            role="option"
            aria-selected={index === active}
            // Keeps the focus in the field, so that the press is not lost to its blur.
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => goTo(item.href)}
            className={`grid cursor-pointer grid-cols-[5.5rem_minmax(0,1fr)] items-baseline gap-x-3 border-b border-hair px-3 py-2 last:border-0 hover:bg-copper-wash max-sm:py-3 ${index === active ? 'bg-copper-wash' : ''}`}
          >
            <span className="text-small text-soft">{item.kind}</span>
            <span className="min-w-0 truncate">
              <span className="font-mono font-semibold">{item.label}</span>
              {item.detail === null ? null : <span className="text-soft"> {item.detail}</span>}
            </span>
          </li>
        ))}
      </ul>
      <span role="status" className="sr-only">
        {showing ? `${found.length} recognised; down arrow to choose` : ''}
      </span>
    </form>
  );
}
