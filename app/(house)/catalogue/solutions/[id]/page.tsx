import type { Metadata } from 'next';
import { LabelElements } from '@/components/catalogue/label-elements';
import { SolutionForm } from '@/components/catalogue/solution-form';
import { Formula } from '@/components/chemistry/formula';
import { Alert } from '@/components/ui/alert';
import { Amount } from '@/components/ui/amount';
import { DefinitionList } from '@/components/ui/definition-list';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { may } from '@/lib/domain/policy';
import { load, pageViewer } from '@/lib/http/page';
import { getSolution } from '@/lib/services/solutions';

export const metadata: Metadata = { title: 'Solution' };

export default async function SolutionPage({ params }: PageProps<'/catalogue/solutions/[id]'>) {
  const viewer = await pageViewer('catalogue:read');
  const { id } = await params;
  const solution = await load(getSolution(viewer, id));
  return (
    <>
      <PageHeader title={solution.name} lead={solution.isArchived ? 'Archived' : undefined} />
      {solution.questions.map((question) => (
        <div key={question} className="mb-4">
          <Alert tone="attention" title={question} />
        </div>
      ))}
      <div className="grid gap-8 lg:grid-cols-2">
        <Section title="What it is">
          <DefinitionList
            items={[
              ...solution.solutes.map(
                ({ substance, name, formula, molarity }) =>
                  [
                    name,
                    <span key={substance}>
                      <Formula id={formula} name={name} /> <Amount value={molarity} unit="mol/L" />
                    </span>,
                  ] as const,
              ),
              ['Computed pH', solution.pH === null ? 'not computed' : solution.pH.toFixed(2)] as const,
              ['Keeps for', `${solution.shelfLifeDays} days`] as const,
              ['Storage', solution.storageNote ?? 'no remark'] as const,
            ]}
          />
        </Section>
        <Section title="Label of the solution as diluted">
          <LabelElements classification={solution.classification} />
        </Section>
      </div>
      {may(viewer, 'recipe:update', { ownerId: solution.ownerId }) && (
        <Section title="Change it">
          <SolutionForm solution={solution} />
        </Section>
      )}
    </>
  );
}
