'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { callApi } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { accountEndpoints, signInSchema } from '@/lib/schemas/account';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { TextInput } from '../ui/inputs';

export function SignInForm() {
  const router = useRouter();
  const [failure, setFailure] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: '', password: '' },
  });
  const { errors, isSubmitting, isSubmitSuccessful } = formState;

  const signIn = handleSubmit(async (values) => {
    setFailure(null);
    try {
      await callApi(accountEndpoints.signIn, { body: values });
    } catch (problem) {
      setError('root', {});
      setFailure(showProblem(problem, setError, ['email', 'password']));
      return;
    }
    router.push('/');
    router.refresh();
  });

  return (
    <form method="post" onSubmit={(event) => void signIn(event)} noValidate className="grid gap-4">
      {failure && <Alert tone="stop" title={failure} />}
      <TextInput
        id="email"
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...register('email')}
      />
      <TextInput
        id="password"
        label="Password"
        type="password"
        autoComplete="current-password"
        error={errors.password?.message}
        {...register('password')}
      />
      <Button
        type="submit"
        look="primary"
        isBusy={isSubmitting || isSubmitSuccessful}
        busyText="Signing in …"
      >
        Sign in
      </Button>
      <p>
        <Link href="/forgot-password">Forgotten password</Link>
      </p>
    </form>
  );
}
