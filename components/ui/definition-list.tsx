import type { ReactNode } from 'react';

/** Name and value side by side. */
export function DefinitionList({
  items,
}: {
  readonly items: readonly (readonly [name: string, value: ReactNode])[];
}) {
  return (
    <dl className="grid grid-cols-[minmax(7rem,max-content)_1fr] gap-x-5 gap-y-1.5">
      {items.map(([name, value]) => (
        <div key={name} className="contents">
          <dt className="text-soft">{name}</dt>
          <dd className="min-w-0 break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
