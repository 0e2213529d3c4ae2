import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
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

export default function RootLayout({ children }: Readonly<{ children: ReactNode }>) {
  return (
    <html lang="en" className={`${text.variable} ${figures.variable}`}>
      <body>
        <QueryProvider>{children}</QueryProvider>
        <Toaster position="bottom-center" toastOptions={{ style: { background: 'var(--ink)', color: 'var(--paper)', border: 'none', fontSize: '1rem' } }} />
      </body>
    </html>
  );
}
