'use client';

import { useSyncExternalStore } from 'react';

const KEY = 'benchwright-paper';
const CHOICES = [
  ['system', 'As the device'],
  ['light', 'Light paper'],
  ['dark', 'Dark paper'],
] as const;

const listeners = new Set<() => void>();
function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Puts the kept choice on the page. */
function apply(choice: string): void {
  if (choice === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = choice;
}

/** Light or dark paper on this device. */
export function ThemeChoice() {
  const choice = useSyncExternalStore(
    subscribe,
    () => localStorage.getItem(KEY) ?? 'system',
    () => 'system',
  );
  const choose = (next: string) => {
    localStorage.setItem(KEY, next);
    apply(next);
    listeners.forEach((listener) => listener());
  };
  return (
    <fieldset>
      <legend className="mb-1 font-semibold">Paper</legend>
      {CHOICES.map(([value, words]) => (
        <label key={value} className="flex min-h-11 items-center gap-3">
          <input
            type="radio"
            name="paper"
            value={value}
            checked={choice === value}
            onChange={() => choose(value)}
            className="size-5 accent-verdigris"
          />
          {words}
        </label>
      ))}
    </fieldset>
  );
}
