'use client';

import { useSyncExternalStore } from 'react';
import { RadioGroup } from '../ui/radio-group';

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
    <RadioGroup
      name="paper"
      legend="Paper"
      value={choice}
      onChange={choose}
      choices={CHOICES.map(([value, label]) => ({ value, label }))}
    />
  );
}
