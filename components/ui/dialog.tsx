'use client';

import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

interface DialogProps {
  readonly title: string;
  readonly description?: string;
  readonly isOpen: boolean;
  readonly onOpenChange: (isOpen: boolean) => void;
  readonly children: ReactNode;
}

/** A question that must be answered before going on. Escape and the cross leave it. */
export function Dialog({ title, description, isOpen, onOpenChange, children }: DialogProps) {
  return (
    <Radix.Root open={isOpen} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/45" />
        <Radix.Content
          {...(description ? {} : { 'aria-describedby': undefined })}
          className="fixed inset-x-3 top-[6vh] z-50 mx-auto max-h-[88vh] max-w-xl overflow-y-auto rounded-md border-2 border-line bg-paper p-5 shadow-lg"
        >
          <div className="rule-double mb-4 flex items-start justify-between gap-4 pb-2">
            <Radix.Title className="text-xl font-bold">{title}</Radix.Title>
            <Radix.Close
              aria-label="Close"
              className="-mt-1 -mr-1 grid size-11 shrink-0 place-items-center rounded text-2xl hover:bg-sunken"
            >
              ×
            </Radix.Close>
          </div>
          {description && <Radix.Description className="mb-4 text-soft">{description}</Radix.Description>}
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
