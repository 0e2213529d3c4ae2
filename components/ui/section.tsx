import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** A part of a page under its own heading and thin rule. */
export function Section({
  title,
  id,
  actions,
  children,
  className,
}: {
  readonly title: string;
  readonly id?: string;
  readonly actions?: ReactNode;
  readonly children: ReactNode;
  readonly className?: string;
}) {
  return (
    <section aria-label={title} id={id} className={classNames('mb-8', className)}>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-3 border-b border-line pb-1">
        <h2 className="text-lg">{title}</h2>
        {actions && <div className="no-print flex flex-wrap gap-2">{actions}</div>}
      </div>
      {children}
    </section>
  );
}
