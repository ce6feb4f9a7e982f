'use client';
/**
 * The one-time secret behind the # of a link: never sent to a server, gone from the address bar once read.
 * Undefined until the page runs in the browser, null where there is none.
 */
import { useEffect, useState } from 'react';

export function useSecretInFragment(): string | null | undefined {
  const [secret, setSecret] = useState<string | null | undefined>(undefined);
  useEffect(() => {
    const found = window.location.hash.slice(1);
    // Strict mode runs effects twice: the second run finds the fragment gone and must not forget the secret.
    if (found !== '') {
      setSecret(found);
      window.history.replaceState(null, '', window.location.pathname);
    } else setSecret((held) => held ?? null);
  }, []);
  return secret;
}
