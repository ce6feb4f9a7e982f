'use client';
/** E-mail and password, or a link by mail: a client component because it signs in without leaving the page on a mistake. */
import { signIn } from 'next-auth/react';
import Link from 'next/link';
import { type FormEvent, useState } from 'react';
import type { askForSignInLink } from '@/lib/workshop/ask-for-link';
import { useCommand } from '@/lib/api/client';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

const REFUSALS: Record<string, string> = {
  CredentialsSignin: 'No account has this address and password. Check both; capitals count in the password.',
  'too-many': 'Too many tries for this account. Wait a quarter of an hour, or ask for a link by e-mail.',
  away: 'The workshop’s server can’t check it right now. Try again in a moment.',
};

export function SignInForm({ next }: { readonly next: string }) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [refusal, setRefusal] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const link = useCommand<typeof askForSignInLink>('POST /sign-in-links');

  async function enter(event: FormEvent) {
    event.preventDefault();
    setBusy(true);
    setRefusal(null);
    try {
      const answer = await signIn('password', { email, password, redirect: false });
      if (answer?.ok && !answer.error) {
        // A whole load, so that nothing of a former session stays in memory.
        window.location.assign(next);
        return;
      }
      setRefusal(REFUSALS[answer?.error ?? ''] ?? REFUSALS.CredentialsSignin ?? '');
    } catch {
      setRefusal(REFUSALS.away ?? '');
    }
    setBusy(false);
  }

  return (
    <form onSubmit={(event) => void enter(event)} className="flex flex-col gap-4" aria-label="Sign in">
      {refusal ? (
        <Notice tone="stop" announce title="Not signed in">
          {refusal}
        </Notice>
      ) : null}
      {link.isSuccess ? (
        <Notice tone="good" announce title="A link is on its way">
          If {link.variables.email} has an account, the mail is there in a minute. The link works once, for 20 minutes.
        </Notice>
      ) : null}
      {link.isError ? (
        <Notice tone="stop" announce title="No link was sent">
          {link.error.details.detail}
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
      <TextField
        label="Password"
        name="password"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" kind="primary" size="large" wide busy={busy} busyWord="Signing in …">
        Sign in
      </Button>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <Button
          kind="quiet"
          busy={link.isPending}
          busyWord="Sending …"
          onClick={() =>
            email.includes('@')
              ? link.mutate({ email })
              : setRefusal('Type your e-mail address first; the link goes there.')
          }
        >
          Mail me a link instead
        </Button>
        <Link href="/password-reset" className="text-copper underline underline-offset-2">
          Password forgotten
        </Link>
      </div>
    </form>
  );
}
