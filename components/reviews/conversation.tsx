'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import type { ReviewCase } from '@/lib/schemas/reviews';
import { Button } from '../ui/button';
import { TextArea } from '../ui/inputs';
import { Moment } from '../ui/moment';
import { Section } from '../ui/section';

/** Questions and answers about a case. */
export function Conversation({ review }: { readonly review: ReviewCase }) {
  const router = useRouter();
  const [body, setBody] = useState('');
  const [key, setKey] = useState(newIdempotencyKey);
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);

  const send = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setFailure(null);
    try {
      await callApi(reviewEndpoints.say, { params: { id: review.id }, body: { body }, idempotencyKey: key });
      setBody('');
      setKey(newIdempotencyKey());
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setFailure(error.errors[0]?.detail ?? error.message);
    } finally {
      setBusy(false);
    }
  };

  return (
    <Section title="Questions and answers">
      {review.messages.length === 0 && <p className="mb-3 text-soft">None so far.</p>}
      <ol className="mb-4 space-y-3">
        {review.messages.map(({ id, authorName, body: said, at }) => (
          <li key={id} className="max-w-[75ch] border-l-2 border-line pl-3">
            <p className="text-sm text-soft">
              {authorName}, <Moment at={at} />
            </p>
            <p className="whitespace-pre-line">{said}</p>
          </li>
        ))}
      </ol>
      <form onSubmit={(event) => void send(event)} className="no-print grid max-w-[75ch] gap-3">
        <TextArea
          id="message"
          label="Your message"
          value={body}
          onChange={(event) => setBody(event.target.value)}
          error={failure ?? undefined}
        />
        <p>
          <Button type="submit" isBusy={isBusy} busyText="Sending …">
            Send
          </Button>
        </p>
      </form>
    </Section>
  );
}
