import type { ReactNode } from 'react';

/** Says what belongs here and offers the first step. */
export function EmptyState({
  title,
  children,
  action,
}: {
  readonly title: string;
  readonly children?: ReactNode;
  readonly action?: ReactNode;
}) {
  return (
    <div className="rounded border border-dashed border-line px-5 py-8">
      <p className="font-semibold">{title}</p>
      {children && <div className="mt-1 max-w-[60ch] text-soft">{children}</div>}
      {action && <div className="mt-4">{action}</div>}
    </div>
  );
}
