import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { DataSheets } from '@/components/catalogue/data-sheets';
import { HoldSubstance } from '@/components/catalogue/hold-substance';
import { Formula } from '@/components/chemistry/formula';
import { Alert } from '@/components/ui/alert';
import { DefinitionList } from '@/components/ui/definition-list';
import { PageHeader } from '@/components/ui/page-header';
import { Section } from '@/components/ui/section';
import { findReaction } from '@/lib/chemistry/species-catalogue';
import { findSubstance } from '@/lib/chemistry/substances';
import { mayByRole } from '@/lib/domain/policy';
import { findSubstanceHazards, groupName } from '@/lib/hazards/tables';
import { load, pageViewer } from '@/lib/http/page';
import { listDataSheets } from '@/lib/services/data-sheets';
import { getSubstance, recipesWith } from '@/lib/services/substances';

export const metadata: Metadata = { title: 'Substance' };

export default async function SubstancePage({ params }: PageProps<'/catalogue/substances/[id]'>) {
  const viewer = await pageViewer('catalogue:read');
  const { id } = await params;
  const substance = await load(getSubstance(viewer, id));
  const hazards = findSubstanceHazards(id);
  const known = findSubstance(id);
  const [sheets, recipes] = await Promise.all([listDataSheets(id), recipesWith(id)]);
  return (
    <>
      <PageHeader title={substance.name} lead={<Formula id={substance.formula} />} />
      {substance.isHeld && (
        <div className="mb-6">
          <Alert tone="stop" title="Held: do not use">
            {substance.heldReason}
          </Alert>
        </div>
      )}
      <div className="grid gap-x-10 lg:grid-cols-2">
        <Section title="Identity">
          <DefinitionList
            items={[
              [
                'CAS',
                <span key="cas" className="font-mono">
                  {substance.cas}
                </span>,
              ],
              [
                'Molar mass',
                substance.molarMassGPerMol === null ? 'none' : `${substance.molarMassGPerMol} g/mol`,
              ],
              [
                'Sold as',
                `${substance.form}${known?.assayPercent ? `, ${known.assayPercent} %` : ''}${known?.densityGPerMl ? `, ${known.densityGPerMl} g/mL` : ''}`,
              ],
              ['In stock', substance.inStock],
              ['Stands with', substance.storageGroup.replaceAll('_', ' ')],
              ['UN number', hazards?.unNumber ?? 'none'],
              ['Waste', hazards?.waste ?? 'no remark'],
              ['Source', known?.source ?? ''],
            ]}
          />
        </Section>
        <Section title="Hazards as sold">
          {hazards && hazards.classes.length > 0 ? (
            <p>{hazards.classes.join('; ')}</p>
          ) : (
            <p>None known here; that is no proof of safety.</p>
          )}
          {hazards && hazards.euh.length > 0 && <p className="font-mono">{hazards.euh.join(', ')}</p>}
          {hazards && <p className="mt-2 text-sm text-soft">Source: {hazards.source}</p>}
          {hazards && hazards.groups.length > 0 && (
            <>
              <h3 className="mt-4 font-semibold">Must not meet carelessly: it counts as</h3>
              <ul className="list-disc pl-5">
                {hazards.groups.map((group) => (
                  <li key={group}>{groupName(group)}</li>
                ))}
              </ul>
            </>
          )}
        </Section>
        <Section title="In solution it gives">
          {known?.releases ? (
            <ul>
              {Object.entries(known.releases).map(([component, count]) => (
                <li key={component} className="flex gap-3 border-b py-1.5">
                  <span className="w-10 text-right font-mono">{count}</span>
                  <Formula id={component} />
                  <Link
                    href={`/catalogue/species?component=${encodeURIComponent(component)}` as Route}
                    className="ml-auto"
                  >
                    its constants
                  </Link>
                </li>
              ))}
            </ul>
          ) : (
            <p>
              It stands outside the equilibrium model: inert in the computation, but screened for hazards.
            </p>
          )}
          {known?.releases &&
            Object.keys(known.releases).every((component) => findReaction(component) === null) && (
              <p className="mt-2 text-sm text-soft">
                Only master components; the species they form are listed with their sources.
              </p>
            )}
        </Section>
        <Section title="Recipes that use it">
          {recipes.length === 0 ? (
            <p className="text-soft">None.</p>
          ) : (
            <ul>
              {recipes.map((recipe) => (
                <li key={recipe.id} className="border-b py-1.5">
                  <Link href={`/catalogue/solutions/${recipe.id}` as Route}>{recipe.name}</Link>
                </li>
              ))}
            </ul>
          )}
        </Section>
        <Section title="Safety data sheets">
          <DataSheets substanceId={id} sheets={sheets} mayUpload={mayByRole(viewer, 'data-sheet:upload')} />
        </Section>
        {mayByRole(viewer, 'substance:hold') && (
          <Section title="Stop its use">
            <HoldSubstance substance={substance} />
          </Section>
        )}
      </div>
    </>
  );
}
