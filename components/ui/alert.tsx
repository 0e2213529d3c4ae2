import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type AlertTone = 'info' | 'done' | 'attention' | 'stop';

const TONES: Readonly<Record<AlertTone, { look: string; mark: string; word: string }>> = {
  info: { look: 'border-copper bg-copper-wash', mark: '●', word: 'Note' },
  done: { look: 'border-verdigris bg-verdigris-wash', mark: '✓', word: 'Done' },
  attention: { look: 'border-amber bg-amber-wash', mark: '◆', word: 'Attention' },
  stop: { look: 'border-signal bg-signal-wash', mark: '▲', word: 'Stop' },
};

/** Says something about the whole page or form: word, shape and colour together. */
export function Alert({
  tone,
  title,
  children,
}: {
  readonly tone: AlertTone;
  readonly title?: string;
  readonly children?: ReactNode;
}) {
  const { look, mark, word } = TONES[tone];
  return (
    <div
      role={tone === 'stop' || tone === 'attention' ? 'alert' : 'status'}
      className={classNames('rounded border-l-4 px-4 py-3', look)}
    >
      <p className="font-semibold">
        <span aria-hidden>{mark} </span>
        {title ?? word}
      </p>
      {children && <div className="mt-0.5">{children}</div>}
    </div>
  );
}
