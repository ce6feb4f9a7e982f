import type { Metadata } from 'next';
import { PageTitle } from '@/components/ui/page-title';
import { NewPasswordForm } from '@/components/workshop/password-reset-form';

export const metadata: Metadata = { title: 'New password' };

export default function NewPasswordPage() {
  return (
    <>
      <PageTitle title="New password" facts={['It ends every session that is still open.']} />
      <NewPasswordForm />
    </>
  );
}
