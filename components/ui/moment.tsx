'use client';

import { useSyncExternalStore } from 'react';

type Style = 'day' | 'day-time' | 'time' | 'short-day';

const OPTIONS: Readonly<Record<Style, Intl.DateTimeFormatOptions>> = {
  day: { weekday: 'long', day: 'numeric', month: 'long' },
  'day-time': { weekday: 'short', day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' },
  time: { hour: '2-digit', minute: '2-digit' },
  'short-day': { day: 'numeric', month: 'short', year: 'numeric' },
};

const never = () => () => undefined;

/** A moment in the reader's language and time zone; the server, which knows neither, writes it in English and UTC. */
export function Moment({ at, style = 'day-time' }: { readonly at: string; readonly style?: Style }) {
  const isBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const isWholeDay = at.length === 10;
  const zone = isWholeDay || !isBrowser ? { timeZone: 'UTC' } : {};
  const text = new Intl.DateTimeFormat(isBrowser ? undefined : 'en-GB', {
    ...OPTIONS[style],
    ...zone,
  }).format(new Date(at));
  return <time dateTime={at}>{text}</time>;
}
