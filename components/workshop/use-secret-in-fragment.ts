'use client';
/**
 * The one-time secret behind the # of a link: never sent to a server, gone from the address bar once read.
 * Undefined until the page runs in the browser, null where there is none.
 */
import { useSyncExternalStore } from 'react';

/** Read once and kept outside of React: the fragment is gone from the address after the first reading. */
let held: string | null | undefined;

function readSecret(): string | null {
  const found = window.location.hash.slice(1);
  if (found !== '') {
    held = found;
    window.history.replaceState(null, '', window.location.pathname);
  }
  return held ?? null;
}

const nothingToFollow = () => () => undefined;

export function useSecretInFragment(): string | null | undefined {
  return useSyncExternalStore<string | null | undefined>(nothingToFollow, readSecret, () => undefined);
}
