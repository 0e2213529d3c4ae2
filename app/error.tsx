'use client';

import { Button } from '@/components/ui/button';

export default function PageError({ reset }: Readonly<{ error: Error; reset: () => void }>) {
  return (
    <div className="mx-auto max-w-xl px-4 py-16">
      <h1 className="text-2xl">This page could not be shown</h1>
      <p className="my-3">
        Nothing was changed. Try again; if it stays so, tell the administrator what you were doing.
      </p>
      <Button look="primary" onClick={reset}>
        Try again
      </Button>
    </div>
  );
}
