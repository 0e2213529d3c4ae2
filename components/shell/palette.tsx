'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Command } from 'cmdk';
import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useDeferredValue, useEffect, useState } from 'react';
import { callApi } from '@/lib/client/api';
import { searchEndpoints } from '@/lib/schemas/search';
import { Dialog } from '../ui/dialog';

/** Finds anything by name, formula, CAS number or code. Opens with Ctrl or Cmd and K, or with a slash. */
export function Palette() {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [text, setText] = useState('');
  const wanted = useDeferredValue(text.trim());
  const { data, isFetching } = useQuery({
    queryKey: ['search', wanted],
    queryFn: ({ signal }) => callApi(searchEndpoints.search, { query: { text: wanted }, signal }),
    enabled: isOpen && wanted.length > 0,
    placeholderData: keepPreviousData,
  });

  useEffect(() => {
    const handleKey = (event: KeyboardEvent) => {
      const isTyping =
        event.target instanceof HTMLElement &&
        event.target.closest('input, textarea, select, [contenteditable]') !== null;
      if ((event.key === 'k' && (event.ctrlKey || event.metaKey)) || (event.key === '/' && !isTyping)) {
        event.preventDefault();
        setOpen(true);
      }
    };
    window.addEventListener('keydown', handleKey);
    return () => window.removeEventListener('keydown', handleKey);
  }, []);

  const hits = wanted ? (data?.hits ?? []) : [];
  return (
    <>
      <button
        type="button"
        onClick={() => setOpen(true)}
        className="flex min-h-11 items-center gap-2 rounded border border-line bg-raised px-3 text-left text-soft hover:bg-sunken lg:w-52"
      >
        <span>Find</span>
        <kbd className="ml-auto rounded-sm border px-1.5 font-mono text-xs max-lg:hidden">/</kbd>
      </button>
      <Dialog title="Find" isOpen={isOpen} onOpenChange={setOpen}>
        <Command label="Find" shouldFilter={false} loop>
          <Command.Input
            value={text}
            onValueChange={setText}
            placeholder="Name, formula, CAS number or code"
            className="min-h-12 w-full rounded border border-line bg-raised px-3 text-lg placeholder:text-soft"
          />
          <Command.List className="mt-3">
            {wanted && !isFetching && hits.length === 0 && (
              <Command.Empty className="py-3">Nothing is called that.</Command.Empty>
            )}
            {hits.map(({ kind, id, label, detail, href }) => (
              <Command.Item
                key={`${kind}:${id}`}
                value={`${kind}:${id}`}
                onSelect={() => {
                  setOpen(false);
                  router.push(href as Route);
                }}
                className="flex min-h-11 cursor-pointer items-baseline gap-3 rounded px-2 py-2 data-[selected=true]:bg-copper-wash"
              >
                <span className="w-20 shrink-0 text-sm text-soft">{kind}</span>
                <span className="font-semibold">{label}</span>
                <span className="ml-auto truncate text-sm text-soft">
                  {kind === 'session' ? detail.slice(0, 10) : detail}
                </span>
              </Command.Item>
            ))}
          </Command.List>
        </Command>
      </Dialog>
    </>
  );
}
