'use client';
/** Accepting an invitation: shows what it offers, asks for name and password, then signs in. */
import { signIn } from 'next-auth/react';
import { type FormEvent, useEffect, useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { acceptInvitation, lookAtInvitation } from '@/lib/workshop/invite-person';
import { useSecretInFragment } from './use-secret-in-fragment';

export function InvitationForm() {
  const token = useSecretInFragment();
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  const look = useCommand<typeof lookAtInvitation>('POST /invitations/look');
  const accept = useCommand<typeof acceptInvitation>('POST /invitations/accept');
  const { mutate: startLooking } = look;
  useEffect(() => {
    if (token) startLooking({ token });
  }, [token, startLooking]);

  if (token === null || look.isError) {
    return (
      <Notice
        tone="stop"
        announce
        title="This invitation does not work"
        actions={<ButtonLink href="/sign-in">Go to sign-in</ButtonLink>}
      >
        {look.isError ? look.error.details.detail : 'Open it from the mail, or copy it to the last character.'}
      </Notice>
    );
  }
  if (!look.data) return <p className="text-soft">Looking at the invitation …</p>;
  const { email, roles, workshopName, hasAccount } = look.data;
  async function enter(event: FormEvent) {
    event.preventDefault();
    if (!token) return;
    const done = await accept.mutateAsync({ token, password, ...(hasAccount ? {} : { name }) }).catch(() => null);
    if (!done) return;
    const answer = await signIn('password', { email: done.email, password, redirect: false }).catch(() => undefined);
    window.location.assign(answer?.ok && !answer.error ? '/' : '/sign-in');
  }
  return (
    <form onSubmit={(event) => void enter(event)} className="flex flex-col gap-4" aria-label="Accept the invitation">
      <p>
        <strong>{workshopName}</strong> invites <span className="font-mono">{email}</span> as {roles.join(' and ')}.
      </p>
      {accept.isError ? (
        <Notice tone="stop" announce title="Not accepted">
          {accept.error.details.detail}
        </Notice>
      ) : null}
      {hasAccount ? null : (
        <TextField
          label="Your name"
          hint="As it will stand in the ledger."
          name="name"
          autoComplete="name"
          required
          value={name}
          onChange={(event) => setName(event.target.value)}
        />
      )}
      <TextField
        label={hasAccount ? 'Your password' : 'A password'}
        hint={
          hasAccount ? 'You have an account already; its password confirms that it is you.' : 'At least 12 characters.'
        }
        name="password"
        type="password"
        autoComplete={hasAccount ? 'current-password' : 'new-password'}
        required
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" kind="primary" size="large" wide busy={accept.isPending} busyWord="Joining …">
        Join {workshopName}
      </Button>
    </form>
  );
}
