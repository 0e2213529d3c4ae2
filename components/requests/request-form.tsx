'use client';

import { useQuery } from '@tanstack/react-query';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { planPreviewOptions } from '@/lib/client/requests';
import { requestEndpoints } from '@/lib/schemas/requests';
import type { RequestDetail } from '@/lib/schemas/requests';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Select, TextArea } from '../ui/inputs';
import { Section } from '../ui/section';
import { Skeleton } from '../ui/skeleton';
import { DemonstrationRow, SolutionRow } from './line-rows';
import { DecisionSentence, PlannedAmounts, PlannedDemonstrations, PlannedFindings } from './plan-view';
import { isPlannable, lineToSend, newLine, typedLine } from './request-lines';
import type { TypedLine } from './request-lines';

export interface SessionChoice {
  readonly id: string;
  readonly words: string;
  readonly benches: number;
}

interface RequestFormProps {
  readonly sessions: readonly SessionChoice[];
  readonly sessionId: string;
  readonly request: RequestDetail | null;
}

const PREVIEW_DELAY_MS = 300;

/** A value once it has rested for a moment. */
function useRested<T>(value: T, delayMs: number): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(value), delayMs);
    return () => clearTimeout(timer);
  }, [value, delayMs]);
  return rested;
}

/** Asks for what a session needs; at the side, what it will do. */
export function RequestForm({ sessions, sessionId: initialSession, request }: RequestFormProps) {
  const router = useRouter();
  const [sessionId, setSessionId] = useState(initialSession);
  const [lines, setLines] = useState<readonly TypedLine[]>(() =>
    request
      ? request.lines.map((line, index) => typedLine(line, request.lineNames[index] ?? ''))
      : [newLine('solution')],
  );
  const [note, setNote] = useState(request?.note ?? '');
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [busy, setBusy] = useState<'save' | 'submit' | null>(null);
  const [key] = useState(newIdempotencyKey);
  const benches = sessions.find(({ id }) => id === sessionId)?.benches ?? 1;

  const plannable = useMemo(() => lines.filter(isPlannable).map(lineToSend), [lines]);
  const rested = useRested(plannable, PREVIEW_DELAY_MS);
  const preview = useQuery(planPreviewOptions(sessionId, request?.id ?? null, useDeferredValue(rested)));

  const change = (lineKey: string, patch: Partial<TypedLine>) =>
    setLines((all) => all.map((line) => (line.key === lineKey ? { ...line, ...patch } : line)));
  const remove = (line: TypedLine) => {
    setLines((all) => all.filter((other) => other.key !== line.key));
    toast(`${line.name || 'The line'} was removed`, {
      action: { label: 'Undo', onClick: () => setLines((all) => [...all, line]) },
    });
  };
  const errorsOf = (index: number) =>
    Object.fromEntries(
      (problem?.errors ?? [])
        .filter(({ pointer }) => pointer.startsWith(`#/lines/${index}/`))
        .map(({ pointer, detail }) => [pointer.split('/').at(-1) ?? '', detail]),
    );
  const homeless = (problem?.errors ?? []).filter(
    ({ pointer }) =>
      !/^#\/lines\/\d+\/\w+$/.test(pointer) && pointer !== '#/sessionId' && pointer !== '#/note',
  );

  const save = async (andSubmit: boolean) => {
    setBusy(andSubmit ? 'submit' : 'save');
    setProblem(null);
    const body = { note: note.trim() || null, lines: lines.map(lineToSend) };
    try {
      const saved = request
        ? await callApi(requestEndpoints.update, {
            params: { id: request.id },
            body: { ...body, version: request.version },
          })
        : await callApi(requestEndpoints.create, { body: { sessionId, ...body }, idempotencyKey: key });
      const isSubmittable = saved.state === 'draft' || saved.state === 'returned';
      const done =
        andSubmit && isSubmittable
          ? await callApi(requestEndpoints.submit, {
              params: { id: saved.id },
              body: { version: saved.version },
            })
          : saved;
      toast(
        done.state === 'agreed'
          ? `${done.code} is agreed`
          : done.state === 'in-review'
            ? `${done.code} went to safety`
            : `${done.code} is kept as a draft`,
      );
      router.push(`/requests/${done.id}` as Route);
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      setBusy(null);
    }
  };

  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(0,1.15fr)_minmax(20rem,1fr)]">
      <div className="min-w-0">
        {problem && (problem.errors.length === 0 || homeless.length > 0) && (
          <div className="mb-4">
            <Alert tone="stop" title={homeless.map(({ detail }) => detail).join(' ') || problem.message}>
              Nothing you typed is lost.
            </Alert>
          </div>
        )}
        <Section title="For which session">
          <Select
            id="session"
            label="Session"
            value={sessionId}
            onChange={(event) => setSessionId(event.target.value)}
            disabled={request !== null}
            error={problem?.errors.find(({ pointer }) => pointer === '#/sessionId')?.detail}
          >
            <option value="">Choose a session</option>
            {sessions.map(({ id, words }) => (
              <option key={id} value={id}>
                {words}
              </option>
            ))}
          </Select>
        </Section>
        <Section title="The tray">
          <ol className="space-y-3">
            {lines.map((line, index) => {
              const shared = {
                line,
                number: index + 1,
                benches,
                errors: errorsOf(index),
                onChange: (patch: Partial<TypedLine>) => change(line.key, patch),
                onRemove: () => remove(line),
              };
              return line.kind === 'solution' ? (
                <SolutionRow key={line.key} {...shared} />
              ) : (
                <DemonstrationRow key={line.key} {...shared} />
              );
            })}
          </ol>
          <div className="mt-4 flex flex-wrap gap-3">
            <Button onClick={() => setLines((all) => [...all, newLine('solution')])}>Add a solution</Button>
            <Button onClick={() => setLines((all) => [...all, newLine('demonstration')])}>
              Add a demonstration
            </Button>
          </div>
        </Section>
        <Section title="For the prep room">
          <TextArea
            id="note"
            label="Note"
            hint="Who shows it, where it should stand, anything unusual."
            value={note}
            onChange={(event) => setNote(event.target.value)}
            error={problem?.errors.find(({ pointer }) => pointer === '#/note')?.detail}
          />
        </Section>
        <div className="flex flex-wrap gap-3">
          <Button
            look="primary"
            isBusy={busy === 'submit'}
            busyText="Submitting …"
            disabled={busy !== null}
            onClick={() => void save(true)}
          >
            Submit the request
          </Button>
          <Button
            isBusy={busy === 'save'}
            busyText="Saving …"
            disabled={busy !== null}
            onClick={() => void save(false)}
          >
            {request ? 'Save the changes' : 'Keep as a draft'}
          </Button>
        </div>
      </div>
      <aside
        aria-label="What it will do"
        aria-live="polite"
        className="min-w-0 lg:sticky lg:top-20 lg:max-h-[calc(100vh-6rem)] lg:self-start lg:overflow-y-auto lg:border-l lg:border-line lg:pl-6"
      >
        {plannable.length === 0 && (
          <p className="text-soft">
            Choose a session and a solution; what it will do is worked out here as you type.
          </p>
        )}
        {preview.isPending && preview.fetchStatus === 'fetching' && <Skeleton lines={5} />}
        {preview.error && (
          <Alert tone="attention" title="It could not be worked out yet">
            {preview.error.message}
          </Alert>
        )}
        {preview.data && plannable.length > 0 && (
          <div aria-busy={preview.isFetching} className={preview.isFetching ? 'opacity-70' : undefined}>
            <DecisionSentence decision={preview.data.decision} />
            <div className="mt-5">
              <PlannedDemonstrations plan={preview.data} />
              <h3 className="mb-2 font-semibold">Findings</h3>
              <PlannedFindings plan={preview.data} isCompact />
              <div className="mt-6">
                <PlannedAmounts plan={preview.data} />
              </div>
            </div>
          </div>
        )}
      </aside>
    </div>
  );
}
