'use client';
/** Asking for a reset link, and setting the new password with it. */
import { type FormEvent, useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { askForPasswordReset } from '@/lib/workshop/ask-for-link';
import type { setPassword } from '@/lib/workshop/set-password';
import { useSecretInFragment } from './use-secret-in-fragment';

export function PasswordResetRequest() {
  const [email, setEmail] = useState('');
  const ask = useCommand<typeof askForPasswordReset>('POST /password-resets');
  function submit(event: FormEvent) {
    event.preventDefault();
    ask.mutate({ email });
  }
  if (ask.isSuccess) {
    return (
      <Notice tone="good" announce title="Look into your mail">
        If {ask.variables.email} has an account, a link to set a new password is there in a minute.
      </Notice>
    );
  }
  return (
    <form onSubmit={submit} className="flex flex-col gap-4" aria-label="Password reset">
      {ask.isError ? (
        <Notice tone="stop" announce title="No mail was sent">
          {ask.error.details.detail}
        </Notice>
      ) : null}
      <TextField
        label="E-mail"
        name="email"
        type="email"
        autoComplete="username"
        required
        value={email}
        onChange={(event) => setEmail(event.target.value)}
      />
      <Button type="submit" kind="primary" size="large" wide busy={ask.isPending} busyWord="Sending …">
        Mail me a link
      </Button>
    </form>
  );
}

export function NewPasswordForm() {
  const token = useSecretInFragment();
  const [password, setNewPassword] = useState('');
  const set = useCommand<typeof setPassword>('POST /password-resets/use');
  if (set.isSuccess) {
    return (
      <Notice
        tone="good"
        announce
        title="Your new password holds"
        actions={<ButtonLink href="/sign-in">Sign in</ButtonLink>}
      >
        Every earlier session was ended.
      </Notice>
    );
  }
  if (token === null) {
    return (
      <Notice
        tone="stop"
        title="This link is not whole"
        actions={<ButtonLink href="/password-reset">Ask for a new one</ButtonLink>}
      >
        Open it from the mail, or copy it to the last character.
      </Notice>
    );
  }
  function submit(event: FormEvent) {
    event.preventDefault();
    if (token) set.mutate({ token, password });
  }
  return (
    <form onSubmit={submit} className="flex flex-col gap-4" aria-label="New password">
      <TextField
        label="New password"
        hint="At least 12 characters. A sentence is easier to keep than a riddle."
        name="password"
        type="password"
        autoComplete="new-password"
        required
        value={password}
        onChange={(event) => setNewPassword(event.target.value)}
        error={set.isError ? set.error.details.detail : undefined}
      />
      <Button type="submit" kind="primary" size="large" wide busy={set.isPending} busyWord="Setting …">
        Set the password
      </Button>
    </form>
  );
}
