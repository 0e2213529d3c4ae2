import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { Shell } from '@/components/shell/shell';
import { findPageViewer } from '@/lib/http/page';

export default async function HouseLayout({ children }: Readonly<{ children: ReactNode }>) {
  const viewer = await findPageViewer();
  if (!viewer) redirect('/sign-in');
  return <Shell viewer={viewer}>{children}</Shell>;
}
