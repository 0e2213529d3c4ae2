'use client';

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { toast } from 'sonner';
import { callApi } from '@/lib/client/api';
import { outboxEndpoints } from '@/lib/schemas/outbox';
import type { OutboxItem } from '@/lib/schemas/outbox';
import { Button } from '../ui/button';
import { ChoiceFilter } from '../ui/choice-filter';
import { ListTable } from '../ui/list-table';
import { Moment } from '../ui/moment';
import { StateMark } from '../ui/state-mark';

const WORDS: Readonly<Record<string, string>> = { waiting: 'waiting', sent: 'sent', dead: 'given up' };

export function OutgoingList() {
  const cache = useQueryClient();
  const resend = useMutation({
    mutationFn: (id: string) => callApi(outboxEndpoints.resend, { params: { id } }),
    onSuccess: async () => {
      toast('It goes out again now');
      await cache.invalidateQueries({ queryKey: [outboxEndpoints.list.path, 'list'] });
    },
    onError: (error) => toast(error.message),
  });
  return (
    <ListTable<OutboxItem>
      endpoint={outboxEndpoints.list}
      label="Outgoing messages"
      empty="Nothing has been sent yet."
      filters={(state, change) => (
        <ChoiceFilter
          label="State"
          field="state"
          choices={Object.entries(WORDS)}
          anyWords="any"
          state={state}
          change={change}
        />
      )}
      columns={[
        { id: 'what', header: 'What', cell: ({ summary }) => summary },
        {
          id: 'channel',
          header: 'By',
          sortKey: 'channel',
          cell: ({ channel }) => (channel === 'mail' ? 'e-mail' : 'ordering service'),
        },
        {
          id: 'state',
          header: 'State',
          sortKey: 'state',
          cell: ({ state }) => <StateMark state={state} words={WORDS[state]} />,
        },
        {
          id: 'attempts',
          header: 'Attempts',
          isNumeric: true,
          sortKey: 'attempts',
          cell: ({ attempts }) => attempts,
        },
        {
          id: 'next',
          header: 'Sent, or next try',
          sortKey: 'nextAttemptAt',
          cell: ({ sentAt, nextAttemptAt, state }) =>
            state === 'dead' ? 'no more tries' : <Moment at={sentAt ?? nextAttemptAt} />,
        },
        { id: 'failure', header: 'Last failure', cell: ({ lastError }) => lastError ?? '' },
        {
          id: 'again',
          header: 'Again',
          cell: ({ id, state }) =>
            state === 'sent' ? null : (
              <Button isBusy={resend.isPending && resend.variables === id} onClick={() => resend.mutate(id)}>
                Send now
              </Button>
            ),
        },
      ]}
    />
  );
}
