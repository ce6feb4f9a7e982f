import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { WorkshopShell } from '@/components/shell/workshop-shell';
import { QueryProvider } from '@/components/workshop/query-provider';
import { ask } from '@/lib/api/ask';
import { endSession, moveSession } from '@/lib/auth/session-cookie';
import { whoAmI } from '@/lib/workshop/who-am-i';

async function signOut(): Promise<void> {
  'use server';
  await endSession();
  redirect('/sign-in');
}

async function switchWorkshop(form: FormData): Promise<void> {
  'use server';
  const asked = form.get('workshopId');
  if (typeof asked === 'string' && /^[0-9a-f-]{36}$/.test(asked)) await moveSession(asked);
  redirect('/');
}

/** Everything behind sign-in: the bar, and who is asking. */
export default async function WorkshopLayout({ children }: { readonly children: ReactNode }) {
  const me = await ask(whoAmI, {});
  return (
    <QueryProvider>
      <WorkshopShell
        workshop={me.workshop}
        workshops={me.workshops}
        person={{ name: me.name, roles: me.roles }}
        signOut={signOut}
        switchWorkshop={switchWorkshop}
        banner={
          process.env.OHMSTEAD_SERVICES === 'fake'
            ? 'Local stand-ins for payments, mail and uploads: no money moves, no mail leaves this machine.'
            : null
        }
      >
        {children}
      </WorkshopShell>
    </QueryProvider>
  );
}
