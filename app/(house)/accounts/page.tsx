import type { Metadata } from 'next';
import { AccountList } from '@/components/accounts/account-list';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Accounts' };

export default async function AccountsPage() {
  await pageViewer('user:manage');
  return (
    <>
      <PageHeader
        title="Accounts"
        lead="Who may sign in, and as what. A change of roles ends that person’s sessions at once."
      />
      <AccountList />
    </>
  );
}
