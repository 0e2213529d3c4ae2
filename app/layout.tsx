import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { headers } from 'next/headers';
import { Toaster } from 'sonner';
import { QueryProvider } from '@/lib/client/query-provider';
import { figures, text } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Benchwright', template: '%s · Benchwright' },
  description: 'The working tool of the prep room',
};
export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f5f0e4' },
    { media: '(prefers-color-scheme: dark)', color: '#1a1c18' },
  ],
};
/** Every answer carries its own nonce, so no page is made in advance. */
export const dynamic = 'force-dynamic';

/** Puts a kept choice of paper on the page before anything is drawn. */
const KEEP_PAPER =
  "try{const p=localStorage.getItem('benchwright-paper');if(p==='light'||p==='dark')document.documentElement.dataset.theme=p}catch{}";

export default async function RootLayout({ children }: Readonly<{ children: ReactNode }>) {
  const nonce = (await headers()).get('x-nonce') ?? undefined;
  return (
    <html lang="en" className={`${text.variable} ${figures.variable}`} suppressHydrationWarning>
      <body>
        <script nonce={nonce} suppressHydrationWarning dangerouslySetInnerHTML={{ __html: KEEP_PAPER }} />
        <QueryProvider>{children}</QueryProvider>
        <Toaster
          position="bottom-center"
          toastOptions={{
            style: { background: 'var(--ink)', color: 'var(--paper)', border: 'none', fontSize: '1rem' },
          }}
        />
      </body>
    </html>
  );
}
