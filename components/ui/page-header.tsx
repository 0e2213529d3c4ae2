import type { ReactNode } from 'react';

interface PageHeaderProps {
  /** A plain statement, with numbers where they tell something. */
  readonly title: string;
  readonly lead?: ReactNode;
  readonly actions?: ReactNode;
  readonly children?: ReactNode;
}

export function PageHeader({ title, lead, actions, children }: PageHeaderProps) {
  return (
    <header className="rule-double mb-6 pb-3">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div className="min-w-0">
          <h1 className="text-2xl md:text-[1.75rem]">{title}</h1>
          {lead && <div className="mt-1 max-w-[75ch] text-soft">{lead}</div>}
        </div>
        {actions && <div className="no-print flex flex-wrap gap-2">{actions}</div>}
      </div>
      {children}
    </header>
  );
}
