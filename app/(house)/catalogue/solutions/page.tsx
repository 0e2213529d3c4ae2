import type { Metadata } from 'next';
import { SolutionList } from '@/components/catalogue/catalogue-lists';
import { CatalogueTabs } from '@/components/catalogue/catalogue-tabs';
import { LinkButton } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { mayByRole } from '@/lib/domain/policy';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Solutions' };

export default async function SolutionsPage() {
  const viewer = await pageViewer('catalogue:read');
  return (
    <>
      <PageHeader
        title="Solutions the house makes"
        actions={
          mayByRole(viewer, 'recipe:create') ? (
            <LinkButton href="/catalogue/solutions/new" look="primary">
              Write a recipe
            </LinkButton>
          ) : null
        }
      />
      <CatalogueTabs here="/catalogue/solutions" />
      <SolutionList />
    </>
  );
}
