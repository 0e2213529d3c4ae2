import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/account/sign-in-form';
import { findPageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage() {
  if (await findPageViewer()) redirect('/');
  return (
    <>
      <h1 className="text-2xl">Sign in to the prep room</h1>
      <SignInForm />
    </>
  );
}
