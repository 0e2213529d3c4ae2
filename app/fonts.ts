import localFont from 'next/font/local';

/** Atkinson Hyperlegible (SIL Open Font License, beside the files): 0 and O, 1, l and I can't be confused on a bottle. */
export const text = localFont({
  src: [
    { path: '../fonts/atkinson-hyperlegible-next-latin-400-normal.woff2', weight: '400' },
    { path: '../fonts/atkinson-hyperlegible-next-latin-600-normal.woff2', weight: '600' },
    { path: '../fonts/atkinson-hyperlegible-next-latin-700-normal.woff2', weight: '700' },
  ],
  variable: '--font-text',
  display: 'swap',
});

export const figures = localFont({
  src: [
    { path: '../fonts/atkinson-hyperlegible-mono-latin-400-normal.woff2', weight: '400' },
    { path: '../fonts/atkinson-hyperlegible-mono-latin-700-normal.woff2', weight: '700' },
  ],
  variable: '--font-figures',
  display: 'swap',
});
