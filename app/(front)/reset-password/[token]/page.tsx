import type { Metadata } from 'next';
import { NewPasswordForm } from '@/components/account/new-password-form';

export const metadata: Metadata = { title: 'New password', referrer: 'no-referrer' };

export default async function ResetPasswordPage({ params }: PageProps<'/reset-password/[token]'>) {
  const { token } = await params;
  return (
    <>
      <h1 className="text-2xl">Set a new password</h1>
      <NewPasswordForm token={token} />
    </>
  );
}
