'use client';

import { useEffect, useId, useRef, useState } from 'react';
import type { KeyboardEvent } from 'react';
import { classNames } from './class-names';
import { CONTROL, Field } from './field';

export interface Choice {
  readonly value: string;
  readonly label: string;
  readonly detail?: string;
}

interface ComboboxProps {
  readonly id: string;
  readonly label: string;
  /** What is chosen now, as the field shows it. */
  readonly chosen: Choice | null;
  readonly onChoose: (choice: Choice) => void;
  /** Choices for a typed text; the empty text asks for the first ones. */
  readonly find: (text: string, signal: AbortSignal) => Promise<readonly Choice[]>;
  readonly error?: string;
  readonly hint?: string;
  readonly placeholder?: string;
  readonly isLabelHidden?: boolean;
  readonly className?: string;
}

const FIND_DELAY_MS = 150;

/** A field that finds what is typed among many choices. Arrow keys, Enter and Escape work as in any list box. */
export function Combobox({
  id,
  label,
  chosen,
  onChoose,
  find,
  error,
  hint,
  placeholder,
  isLabelHidden,
  className,
}: ComboboxProps) {
  const listId = useId();
  const [text, setText] = useState<string | null>(null);
  const [choices, setChoices] = useState<readonly Choice[]>([]);
  const [active, setActive] = useState(0);
  const isOpen = text !== null;
  const findRef = useRef(find);
  useEffect(() => {
    findRef.current = find;
  }, [find]);

  useEffect(() => {
    if (text === null) return undefined;
    const stop = new AbortController();
    const timer = setTimeout(() => {
      findRef.current(text, stop.signal).then(
        (found) => {
          setChoices(found);
          setActive(0);
        },
        () => undefined,
      );
    }, FIND_DELAY_MS);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [text]);

  const choose = (choice: Choice | undefined) => {
    if (!choice) return;
    onChoose(choice);
    setText(null);
  };
  const handleKey = (event: KeyboardEvent) => {
    if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault();
      if (!isOpen) setText('');
      else
        setActive((index) =>
          Math.max(0, Math.min(choices.length - 1, index + (event.key === 'ArrowDown' ? 1 : -1))),
        );
    } else if (event.key === 'Enter' && isOpen) {
      event.preventDefault();
      choose(choices[active]);
    } else if (event.key === 'Escape' && isOpen) {
      event.preventDefault();
      setText(null);
    }
  };
  const described = [hint ? `${id}-hint` : null, error ? `${id}-error` : null].filter(Boolean).join(' ');

  return (
    <Field
      id={id}
      label={label}
      error={error}
      hint={hint}
      isLabelHidden={isLabelHidden}
      className={classNames('relative', className)}
    >
      <input
        id={id}
        type="text"
        role="combobox"
        aria-expanded={isOpen}
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={isOpen && choices[active] ? `${listId}-${active}` : undefined}
        aria-invalid={error ? true : undefined}
        aria-describedby={described || undefined}
        autoComplete="off"
        placeholder={placeholder}
        value={text ?? chosen?.label ?? ''}
        onChange={(event) => setText(event.target.value)}
        onFocus={(event) => event.target.select()}
        onClick={() => setText((now) => now ?? '')}
        onBlur={() => setText(null)}
        onKeyDown={handleKey}
        className={CONTROL}
      />
      <ul
        id={listId}
        role="listbox"
        aria-label={label}
        className={classNames(
          'absolute inset-x-0 z-20 mt-1 max-h-72 overflow-y-auto rounded border border-line bg-raised py-1 shadow-md',
          !isOpen && 'hidden',
        )}
      >
        {isOpen && choices.length === 0 && (
          <li className="px-3 py-2 text-soft">{text ? 'Nothing is called that.' : 'Loading …'}</li>
        )}
        {choices.map((choice, index) => (
          <li
            key={choice.value}
            id={`${listId}-${index}`}
            role="option"
            aria-selected={index === active}
            onMouseDown={(event) => {
              event.preventDefault();
              choose(choice);
            }}
            className={classNames(
              'flex min-h-11 cursor-pointer items-baseline justify-between gap-3 px-3 py-2',
              index === active && 'bg-copper-wash',
            )}
          >
            <span>{choice.label}</span>
            {choice.detail && <span className="text-right text-sm text-soft">{choice.detail}</span>}
          </li>
        ))}
      </ul>
    </Field>
  );
}
