import type { Metadata } from 'next';
import { PageTitle } from '@/components/ui/page-title';
import { InvitationForm } from '@/components/workshop/invitation-form';

export const metadata: Metadata = { title: 'Invitation' };

export default function InvitationPage() {
  return (
    <>
      <PageTitle title="Ohmstead" remainder="an invitation" />
      <InvitationForm />
    </>
  );
}
