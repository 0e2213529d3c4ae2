import { classNames } from '../ui/class-names';

/** The signal word of a classification: set in capitals by its look, read as a word. */
export function SignalWord({
  word,
  className,
}: {
  readonly word: 'Danger' | 'Warning';
  readonly className?: string;
}) {
  return (
    <strong
      className={classNames(
        'inline-block border-2 border-current px-2 leading-snug tracking-wide uppercase',
        word === 'Danger' ? 'text-signal' : 'text-amber',
        className,
      )}
    >
      {word}
    </strong>
  );
}
