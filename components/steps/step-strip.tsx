import Link from 'next/link';
import type { Route } from 'next';
import { classNames } from '../ui/class-names';

export const STEPS = ['Ask', 'Check', 'Make', 'Hand over'] as const;

interface StepStripProps {
  /** How many steps are behind us: 0 to 4. */
  readonly done: number;
  /** Said under the step that is going on, such as "waits for safety". */
  readonly now?: string;
  readonly isStopped?: boolean;
  /** Where each step can be looked at; absent where there is nothing yet. */
  readonly hrefs?: readonly (Route | null)[];
}

/** How far a request or a batch has come, and the way between its parts. */
export function StepStrip({ done, now, isStopped = false, hrefs = [] }: StepStripProps) {
  return (
    <nav aria-label="Steps" className="no-print mb-6">
      <ol className="grid grid-cols-4 border border-line">
        {STEPS.map((step, index) => {
          const isDone = index < done;
          const isCurrent = index === done;
          const href = hrefs[index];
          const content = (
            <>
              <span className="flex items-center gap-2 font-semibold">
                <span aria-hidden>{isDone ? '✓' : isCurrent && isStopped ? '▲' : isCurrent ? '▸' : '○'}</span>
                {step}
              </span>
              <span className="block min-h-5 text-sm leading-tight">
                {isDone ? <span className="sr-only">done</span> : isCurrent ? now : null}
              </span>
            </>
          );
          const look = classNames(
            'block h-full px-2 py-2 sm:px-4',
            isDone && 'bg-verdigris text-on-verdigris',
            isCurrent && (isStopped ? 'bg-signal-wash text-signal' : 'bg-amber-wash text-ink'),
            !isDone && !isCurrent && 'text-soft',
          );
          return (
            <li
              key={step}
              aria-current={isCurrent ? 'step' : undefined}
              className={classNames(index > 0 && 'border-l border-line')}
            >
              {href ? (
                <Link href={href} className={classNames(look, 'no-underline')}>
                  {content}
                </Link>
              ) : (
                <div className={look}>{content}</div>
              )}
            </li>
          );
        })}
      </ol>
    </nav>
  );
}
