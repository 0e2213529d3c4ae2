import type { ReactNode } from 'react';

/** More for whoever wants it. */
export function Details({
  summary,
  children,
  isOpen = false,
}: {
  readonly summary: ReactNode;
  readonly children: ReactNode;
  readonly isOpen?: boolean;
}) {
  return (
    <details open={isOpen} className="group">
      <summary className="cursor-pointer py-1 font-semibold text-copper">{summary}</summary>
      <div className="pt-1 pb-2">{children}</div>
    </details>
  );
}
