import type { ReactNode } from 'react';

export default function FrontLayout({ children }: Readonly<{ children: ReactNode }>) {
  return (
    <main className="mx-auto grid min-h-screen max-w-md content-center gap-6 px-4 py-10">
      <p className="rule-double pb-2 text-lg font-bold">Benchwright</p>
      {children}
    </main>
  );
}
