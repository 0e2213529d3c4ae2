'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import Link from 'next/link';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { callApi } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { accountEndpoints, forgotPasswordSchema } from '@/lib/schemas/account';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { TextInput } from '../ui/inputs';

export function ForgotPasswordForm() {
  const [failure, setFailure] = useState<string | null>(null);
  const [isAsked, setAsked] = useState(false);
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(forgotPasswordSchema),
    defaultValues: { email: '' },
  });

  const ask = handleSubmit(async (values) => {
    setFailure(null);
    try {
      await callApi(accountEndpoints.forgotPassword, { body: values });
      setAsked(true);
    } catch (problem) {
      setFailure(showProblem(problem, setError, ['email']));
    }
  });

  if (isAsked) {
    return (
      <Alert tone="done" title="If there is such an account, a letter is on its way">
        It holds an address that works once, for half an hour. <Link href="/sign-in">Back to sign in</Link>
      </Alert>
    );
  }
  return (
    <form method="post" onSubmit={(event) => void ask(event)} noValidate className="grid gap-4">
      {failure && <Alert tone="stop" title={failure} />}
      <TextInput
        id="email"
        label="E-mail"
        type="email"
        autoComplete="username"
        error={formState.errors.email?.message}
        {...register('email')}
      />
      <Button type="submit" look="primary" isBusy={formState.isSubmitting} busyText="Asking …">
        Send me a letter
      </Button>
      <p>
        <Link href="/sign-in">Back to sign in</Link>
      </p>
    </form>
  );
}
