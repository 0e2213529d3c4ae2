import type { Metadata } from 'next';
import { ForgotPasswordForm } from '@/components/account/forgot-password-form';

export const metadata: Metadata = { title: 'Forgotten password' };

export default function ForgotPasswordPage() {
  return (
    <>
      <h1 className="text-2xl">Forgotten password</h1>
      <ForgotPasswordForm />
    </>
  );
}
