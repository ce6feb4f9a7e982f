'use client';
/** Signs in with the one-time link. It asks for a press, because mail scanners open links and would use it up. */
import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useSecretInFragment } from './use-secret-in-fragment';

export function LinkSignIn() {
  const token = useSecretInFragment();
  const [state, setState] = useState<'ready' | 'busy' | 'refused'>('ready');
  if (state === 'refused' || token === null) {
    return (
      <Notice
        tone="stop"
        announce
        title="This link does not work any more"
        actions={<ButtonLink href="/sign-in">Ask for a new one</ButtonLink>}
      >
        It was used already, or its 20 minutes are over.
      </Notice>
    );
  }
  async function enter() {
    setState('busy');
    const answer = await signIn('link', { token, redirect: false }).catch(() => undefined);
    if (answer?.ok && !answer.error) window.location.replace(new URL('/', window.location.href));
    else setState('refused');
  }
  return (
    <Button
      kind="primary"
      size="large"
      wide
      busy={state === 'busy' || token === undefined}
      busyWord="Signing in …"
      onClick={() => void enter()}
    >
      Sign in now
    </Button>
  );
}
