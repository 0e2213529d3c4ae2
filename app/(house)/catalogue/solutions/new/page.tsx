import type { Metadata } from 'next';
import { SolutionForm } from '@/components/catalogue/solution-form';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Write a recipe' };

export default async function NewSolutionPage() {
  await pageViewer('recipe:create');
  return (
    <>
      <PageHeader title="Write a recipe" />
      <SolutionForm solution={null} />
    </>
  );
}
