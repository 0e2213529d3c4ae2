import substanceData from './data/substances.json';
import type { Substance } from './types';

/** A catalogue substance with what is known of its solutions' life. */
export interface CatalogueSubstance extends Substance {
  readonly solutionLifeDays: number | null;
  readonly solutionNote: string | null;
  readonly source: string;
}

interface RawSubstance extends Omit<
  CatalogueSubstance,
  'releases' | 'form' | 'formula' | 'molarMassGPerMol'
> {
  readonly molarMassGPerMol: number | null;
  readonly form: string;
  readonly formula: string | null;
  readonly releases: Readonly<Record<string, number | undefined>> | null;
}

export const ALL_SUBSTANCES: readonly CatalogueSubstance[] = (substanceData.substances as RawSubstance[]).map(
  (raw) => ({
    ...raw,
    formula: raw.formula ?? '',
    molarMassGPerMol: raw.molarMassGPerMol ?? NaN,
    form: raw.form as Substance['form'],
    releases: raw.releases as Substance['releases'],
  }),
);

const byId = new Map(ALL_SUBSTANCES.map((substance) => [substance.id, substance]));
const byCas = new Map(ALL_SUBSTANCES.map((substance) => [substance.cas, substance]));

/** A substance by its catalogue id or its CAS number. */
export function findSubstance(idOrCas: string): CatalogueSubstance | null {
  return byId.get(idOrCas) ?? byCas.get(idOrCas) ?? null;
}
