'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi } from '@/lib/client/api';
import { reviewEndpoints } from '@/lib/schemas/reviews';
import type { ReviewCase } from '@/lib/schemas/reviews';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { TextArea, TextInput } from '../ui/inputs';

type Verdict = 'agreed' | 'agreed-with-conditions' | 'returned' | 'refused';

const WORDS: Readonly<
  Record<Verdict, { button: string; title: string; text: string; look: 'primary' | 'quiet' | 'danger' }>
> = {
  agreed: { button: 'Agree', title: 'Agree to this plan', text: 'Remark (may stay empty)', look: 'primary' },
  'agreed-with-conditions': {
    button: 'Agree with conditions',
    title: 'Agree with conditions',
    text: 'Remark (may stay empty)',
    look: 'quiet',
  },
  returned: {
    button: 'Return with a question',
    title: 'Return with a question',
    text: 'The question',
    look: 'quiet',
  },
  refused: { button: 'Refuse', title: 'Refuse this plan', text: 'The reason', look: 'danger' },
};

/** Stays at the foot of the case. Every judgement is signed with the password. */
export function DecisionBar({ review }: { readonly review: ReviewCase }) {
  const [verdict, setVerdict] = useState<Verdict | null>(null);
  if (review.state !== 'waiting') return null;
  const mayAgree = review.mayDecide && review.whyNotAgree === null;
  return (
    <div className="no-print sticky bottom-0 z-20 -mx-4 border-t-4 border-double border-line bg-paper px-4 py-3 max-md:bottom-14">
      {review.whyNotAgree && (
        <div className="mb-3">
          <Alert tone="stop" title={review.whyNotAgree} />
        </div>
      )}
      {review.mayDecide && (
        <div className="flex flex-wrap gap-2">
          {(Object.keys(WORDS) as Verdict[])
            .filter((name) => mayAgree || name === 'returned' || name === 'refused')
            .map((name) => (
              <Button key={name} look={WORDS[name].look} onClick={() => setVerdict(name)}>
                {WORDS[name].button}
              </Button>
            ))}
        </div>
      )}
      <Dialog
        title={verdict ? WORDS[verdict].title : ''}
        isOpen={verdict !== null}
        onOpenChange={() => setVerdict(null)}
      >
        {verdict && <DecisionForm review={review} verdict={verdict} onDone={() => setVerdict(null)} />}
      </Dialog>
    </div>
  );
}

function DecisionForm({
  review,
  verdict,
  onDone,
}: {
  readonly review: ReviewCase;
  readonly verdict: Verdict;
  readonly onDone: () => void;
}) {
  const router = useRouter();
  const [text, setText] = useState('');
  const [conditions, setConditions] = useState('');
  const [password, setPassword] = useState('');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const errorOf = (field: string) =>
    problem?.errors.find(({ pointer }) => pointer.startsWith(`#/${field}`))?.detail;

  const sign = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    const signature = { version: review.version, password };
    const lines = conditions
      .split('\n')
      .map((line) => line.trim())
      .filter(Boolean);
    const body =
      verdict === 'agreed-with-conditions'
        ? { verdict, text, conditions: lines, ...signature }
        : { verdict, text, ...signature };
    try {
      await callApi(reviewEndpoints.decide, { params: { id: review.id }, body });
      toast('Signed and recorded');
      onDone();
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void sign(event)} noValidate className="grid gap-4">
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      {verdict === 'agreed-with-conditions' && (
        <TextArea
          id="conditions"
          label="Conditions, one a line"
          hint="Each becomes a line to be ticked on the batch sheet."
          rows={4}
          value={conditions}
          onChange={(event) => setConditions(event.target.value)}
          error={errorOf('conditions')}
        />
      )}
      <TextArea
        id="decision-text"
        label={WORDS[verdict].text}
        value={text}
        onChange={(event) => setText(event.target.value)}
        error={errorOf('text')}
      />
      <TextInput
        id="decision-password"
        label="Your password, as signature"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={(event) => setPassword(event.target.value)}
        error={errorOf('password')}
      />
      <Button
        type="submit"
        look={verdict === 'refused' ? 'danger' : 'primary'}
        isBusy={isBusy}
        busyText="Signing …"
      >
        Sign
      </Button>
    </form>
  );
}
