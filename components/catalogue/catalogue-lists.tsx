'use client';

import Link from 'next/link';
import { formatMolarity } from '@/lib/client/format';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import type { Solution } from '@/lib/schemas/solutions';
import { substanceEndpoints } from '@/lib/schemas/substances';
import type { SpeciesRow, SubstanceRow } from '@/lib/schemas/substances';
import { Formula } from '../chemistry/formula';
import { EmptyState } from '../ui/empty-state';
import { ListTable } from '../ui/list-table';
import { StateMark } from '../ui/state-mark';

export function SubstanceList() {
  return (
    <ListTable<SubstanceRow>
      endpoint={substanceEndpoints.list}
      label="Substances"
      searchLabel="Name, formula or CAS number"
      empty={<EmptyState title="No substances">They come with the data files.</EmptyState>}
      columns={[
        {
          id: 'name',
          header: 'Substance',
          sortKey: 'name',
          cell: ({ id, name }) => (
            <Link href={`/catalogue/substances/${id}`} className="font-semibold">
              {name}
            </Link>
          ),
        },
        {
          id: 'formula',
          header: 'Formula',
          sortKey: 'formula',
          cell: ({ formula }) => <Formula id={formula} />,
        },
        {
          id: 'cas',
          header: 'CAS',
          sortKey: 'cas',
          cell: ({ cas }) => <span className="font-mono">{cas}</span>,
        },
        {
          id: 'group',
          header: 'Stands with',
          sortKey: 'storageGroup',
          cell: ({ storageGroup, restricted }) =>
            `${storageGroup.replaceAll('_', ' ')}${restricted ? ', restricted' : ''}`,
        },
        { id: 'stock', header: 'In stock', isNumeric: true, cell: ({ inStock }) => inStock },
        { id: 'state', header: 'State', cell: ({ isHeld }) => (isHeld ? <StateMark state="held" /> : null) },
      ]}
    />
  );
}

export function SolutionList() {
  return (
    <ListTable<Solution>
      endpoint={solutionEndpoints.list}
      label="Solutions"
      searchLabel="Name"
      empty={
        <EmptyState title="No recipes yet">
          A recipe says what is dissolved, how strong, and how long it keeps.
        </EmptyState>
      }
      columns={[
        {
          id: 'name',
          header: 'Solution',
          sortKey: 'name',
          cell: ({ id, name }) => (
            <Link href={`/catalogue/solutions/${id}`} className="font-semibold">
              {name}
            </Link>
          ),
        },
        {
          id: 'solutes',
          header: 'Dissolved',
          cell: ({ solutes }) =>
            solutes.map(({ substance, formula, molarity }) => (
              <span key={substance} className="mr-4 block md:inline-block">
                <Formula id={formula} />{' '}
                <span className="font-mono text-soft">{formatMolarity(molarity)}</span>
              </span>
            )),
        },
        {
          id: 'life',
          header: 'Keeps',
          isNumeric: true,
          sortKey: 'shelfLifeDays',
          cell: ({ shelfLifeDays }) => `${shelfLifeDays} days`,
        },
        {
          id: 'tolerance',
          header: 'Made to',
          cell: ({ toleranceClass }) =>
            ({ bench: '5 %', ordinary: '1 %', analytical: '0.2 %' })[toleranceClass],
        },
        { id: 'note', header: 'Storage', cell: ({ storageNote }) => storageNote ?? '' },
      ]}
    />
  );
}

export function SpeciesList() {
  return (
    <ListTable<SpeciesRow>
      endpoint={substanceEndpoints.species}
      label="Species"
      searchLabel="Species or name"
      empty="No species."
      columns={[
        { id: 'id', header: 'Species', sortKey: 'id', cell: ({ id }) => <Formula id={id} /> },
        { id: 'name', header: 'Name', sortKey: 'name', cell: ({ name }) => name },
        {
          id: 'from',
          header: 'Formed from',
          cell: ({ formedFrom }) => <span className="font-mono text-sm">{formedFrom}</span>,
        },
        {
          id: 'logK',
          header: 'log K',
          isNumeric: true,
          sortKey: 'logK',
          cell: ({ logK }) => logK?.toFixed(2) ?? '–',
        },
        { id: 'source', header: 'Source', cell: ({ source }) => <span className="text-sm">{source}</span> },
      ]}
    />
  );
}
