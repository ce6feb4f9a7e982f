import type { Metadata } from 'next';
import { PageTitle } from '@/components/ui/page-title';
import { PasswordResetRequest } from '@/components/workshop/password-reset-form';

export const metadata: Metadata = { title: 'Password forgotten' };

export default function PasswordResetPage() {
  return (
    <>
      <PageTitle title="Password forgotten" facts={['A link to set a new one goes to your address.']} />
      <PasswordResetRequest />
    </>
  );
}
