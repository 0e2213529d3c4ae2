import type { Metadata } from 'next';
import { SubstanceList } from '@/components/catalogue/catalogue-lists';
import { CatalogueTabs } from '@/components/catalogue/catalogue-tabs';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Catalogue' };

export default async function CataloguePage() {
  await pageViewer('catalogue:read');
  return (
    <>
      <PageHeader
        title="What is this, and what does it do?"
        lead="Every substance of the house. Empty hazard classes mean none known here, not safe."
      />
      <CatalogueTabs here="/catalogue" />
      <SubstanceList />
    </>
  );
}
