'use client';

import { format } from 'date-fns';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { labSessionEndpoints } from '@/lib/schemas/lab-sessions';
import type { LabSession, RoomRow } from '@/lib/schemas/lab-sessions';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Checkbox, NumberInput, Select, TextInput } from '../ui/inputs';

const localInput = (iso: string) => format(new Date(iso), "yyyy-MM-dd'T'HH:mm");
/** An hour as typed, in the reader's time zone, as a moment; what can't be read stays as it is for the server to name. */
function momentOf(text: string): string {
  const date = new Date(text);
  return Number.isNaN(date.getTime()) ? text : date.toISOString();
}

/** Makes a session, or changes one. */
export function SessionForm({
  rooms,
  session,
}: {
  readonly rooms: readonly RoomRow[];
  readonly session: LabSession | null;
}) {
  const router = useRouter();
  const [course, setCourse] = useState(session?.course ?? '');
  const [title, setTitle] = useState(session?.title ?? '');
  const [startsAt, setStartsAt] = useState(session ? localInput(session.startsAt) : '');
  const [endsAt, setEndsAt] = useState(session ? localInput(session.endsAt) : '');
  const [roomId, setRoomId] = useState(session?.roomId ?? '');
  const [benches, setBenches] = useState(String(session?.benches ?? ''));
  const [isCancelled, setCancelled] = useState(session?.isCancelled ?? false);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key] = useState(newIdempotencyKey);
  const errorOf = (field: string) => problem?.errors.find(({ pointer }) => pointer === `#/${field}`)?.detail;

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    const body = {
      course,
      title,
      startsAt: momentOf(startsAt),
      endsAt: momentOf(endsAt),
      roomId,
      benches: benches.trim() === '' ? NaN : Number(benches),
    };
    try {
      const saved = session
        ? await callApi(labSessionEndpoints.update, {
            params: { id: session.id },
            body: { ...body, isCancelled, version: session.version },
          })
        : await callApi(labSessionEndpoints.create, { body, idempotencyKey: key });
      toast(session ? 'The session is changed' : 'The session is made');
      router.push(`/sessions/${saved.id}` as Route);
      router.refresh();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid max-w-2xl gap-4 sm:grid-cols-2">
      {problem && problem.errors.length === 0 && (
        <div className="sm:col-span-2">
          <Alert tone="stop" title={problem.message} />
        </div>
      )}
      <TextInput
        id="course"
        label="Course"
        value={course}
        onChange={(event) => setCourse(event.target.value)}
        error={errorOf('course')}
      />
      <TextInput
        id="title"
        label="Title"
        value={title}
        onChange={(event) => setTitle(event.target.value)}
        error={errorOf('title')}
      />
      <TextInput
        id="starts"
        label="Starts"
        type="datetime-local"
        value={startsAt}
        onChange={(event) => setStartsAt(event.target.value)}
        error={errorOf('startsAt')}
      />
      <TextInput
        id="ends"
        label="Ends"
        type="datetime-local"
        value={endsAt}
        onChange={(event) => setEndsAt(event.target.value)}
        error={errorOf('endsAt')}
      />
      <Select
        id="room"
        label="Room"
        value={roomId}
        onChange={(event) => setRoomId(event.target.value)}
        error={errorOf('roomId')}
      >
        <option value="">Choose a room</option>
        {rooms.map((room) => (
          <option key={room.id} value={room.id}>
            {room.name} ({room.benches} benches)
          </option>
        ))}
      </Select>
      <NumberInput
        id="benches"
        label="Benches"
        value={benches}
        onChange={(event) => setBenches(event.target.value)}
        error={errorOf('benches')}
      />
      {session && (
        <Checkbox
          id="cancelled"
          label="Cancelled"
          hint="Nothing more is made for it."
          checked={isCancelled}
          onChange={(event) => setCancelled(event.target.checked)}
        />
      )}
      <div className="sm:col-span-2">
        <Button type="submit" look="primary" isBusy={isBusy} busyText="Saving …">
          {session ? 'Save the session' : 'Make the session'}
        </Button>
      </div>
    </form>
  );
}
