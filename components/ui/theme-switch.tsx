'use client';
/** Paper or bench lamp. Client: it changes the document at once and leaves a cookie for the next page. */
import { useSyncExternalStore } from 'react';
import { Glyph } from './glyph';

type Theme = 'paper' | 'lamp';

const listeners = new Set<() => void>();

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  const system = window.matchMedia('(prefers-color-scheme: dark)');
  system.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    system.removeEventListener('change', listener);
  };
}

function current(): Theme {
  const chosen = document.documentElement.dataset.theme;
  if (chosen === 'paper' || chosen === 'lamp') return chosen;
  return window.matchMedia('(prefers-color-scheme: dark)').matches ? 'lamp' : 'paper';
}

function choose(theme: Theme): void {
  document.documentElement.dataset.theme = theme;
  const yearSeconds = 365 * 24 * 60 * 60;
  document.cookie = `theme=${theme}; Path=/; Max-Age=${yearSeconds}; SameSite=Lax`;
  for (const listener of listeners) listener();
}

export function ThemeSwitch() {
  const theme = useSyncExternalStore<Theme>(subscribe, current, () => 'paper');
  const lit = theme === 'lamp';
  return (
    <button
      type="button"
      role="switch"
      aria-checked={lit}
      onClick={() => choose(lit ? 'paper' : 'lamp')}
      className="flex min-h-10 w-full items-center gap-2.5 px-3 text-left hover:bg-copper-wash max-sm:min-h-12"
    >
      <Glyph name="lamp" className="text-soft" />
      <span className="flex-1">Bench lamp</span>
      <span
        aria-hidden
        className={`flex h-4.5 w-8 items-center border p-0.5 ${lit ? 'justify-end border-copper bg-copper-wash' : 'justify-start border-edge'}`}
      >
        <span className={`size-3 ${lit ? 'bg-copper' : 'bg-edge'}`} />
      </span>
    </button>
  );
}
