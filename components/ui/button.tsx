import Link from 'next/link';
import type { Route } from 'next';
import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { classNames } from './class-names';

export type ButtonLook = 'primary' | 'quiet' | 'danger' | 'plain';

const LOOKS: Readonly<Record<ButtonLook, string>> = {
  primary: 'border-verdigris bg-verdigris text-on-verdigris hover:brightness-110',
  quiet: 'border-line bg-raised text-ink hover:bg-sunken',
  danger: 'border-signal bg-raised text-signal hover:bg-signal-wash',
  plain: 'border-transparent text-copper underline hover:bg-copper-wash',
};
const SHAPE =
  'inline-flex min-h-11 items-center justify-center gap-2 rounded border px-4 py-2 text-base font-semibold transition-colors disabled:cursor-not-allowed disabled:opacity-55';

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly look?: ButtonLook;
  /** While true the button says so and can't be pressed again. */
  readonly isBusy?: boolean;
  readonly busyText?: string;
}

export function Button({
  look = 'quiet',
  isBusy = false,
  busyText,
  disabled,
  children,
  className,
  type = 'button',
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled || isBusy}
      aria-busy={isBusy || undefined}
      className={classNames(SHAPE, LOOKS[look], className)}
    >
      {isBusy && (
        <span
          aria-hidden
          className="size-4 animate-spin rounded-full border-2 border-current border-t-transparent"
        />
      )}
      {isBusy && busyText ? busyText : children}
    </button>
  );
}

interface LinkButtonProps<T extends string> {
  readonly href: Route<T>;
  readonly look?: ButtonLook;
  readonly children: ReactNode;
  readonly className?: string;
}

/** A link that looks like a button; for going somewhere, never for doing something. */
export function LinkButton<T extends string>({
  href,
  look = 'quiet',
  children,
  className,
}: LinkButtonProps<T>) {
  return (
    <Link href={href} className={classNames(SHAPE, LOOKS[look], 'no-underline', className)}>
      {children}
    </Link>
  );
}
