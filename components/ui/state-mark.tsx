import { stateWords } from '@/lib/domain/states';
import { classNames } from './class-names';

type Tone = 'plain' | 'going' | 'good' | 'attention' | 'stop';

const LOOKS: Readonly<Record<Tone, { look: string; mark: string }>> = {
  plain: { look: 'border-line text-soft', mark: '○' },
  going: { look: 'border-copper text-copper', mark: '◐' },
  good: { look: 'border-verdigris text-verdigris', mark: '●' },
  attention: { look: 'border-amber text-amber', mark: '◆' },
  stop: { look: 'border-signal text-signal', mark: '▲' },
};

const TONE_OF: Readonly<Record<string, Tone>> = {
  draft: 'plain',
  planned: 'plain',
  withdrawn: 'plain',
  closed: 'plain',
  spent: 'plain',
  discarded: 'plain',
  lapsed: 'plain',
  cancelled: 'plain',
  note: 'plain',
  asked: 'going',
  making: 'going',
  'in-work': 'going',
  sent: 'going',
  acknowledged: 'going',
  'part-received': 'going',
  'on-order': 'going',
  requested: 'going',
  'handed-over': 'going',
  agreed: 'good',
  ready: 'good',
  checked: 'good',
  bottled: 'good',
  approved: 'good',
  received: 'good',
  covered: 'good',
  clear: 'good',
  matched: 'good',
  succeeded: 'good',
  filled: 'good',
  'in-review': 'attention',
  waiting: 'attention',
  returned: 'attention',
  'agreed-with-conditions': 'attention',
  'for-approval': 'attention',
  open: 'attention',
  review: 'attention',
  controlled: 'attention',
  caution: 'attention',
  refused: 'stop',
  stop: 'stop',
  held: 'stop',
  dead: 'stop',
  failed: 'stop',
  disputed: 'stop',
};

/** A state as a word with a shape; the colour only repeats them. */
export function StateMark({ state, words }: { readonly state: string; readonly words?: string }) {
  const { look, mark } = LOOKS[TONE_OF[state] ?? 'plain'];
  return (
    <span
      className={classNames(
        'inline-flex items-center gap-1.5 rounded-sm border px-2 py-0.5 text-sm font-semibold whitespace-nowrap',
        look,
      )}
    >
      <span aria-hidden className="text-[0.7em]">
        {mark}
      </span>
      {words ?? stateWords(state)}
    </span>
  );
}
