import 'server-only';
import { Op } from 'sequelize';
import { ALL_SPECIES, findReaction } from '@/lib/chemistry/species-catalogue';
import { DomainError } from '@/lib/domain/errors';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { Page } from '@/lib/schemas/list';
import type {
  Hold,
  SpeciesListQuery,
  SpeciesRow,
  SubstanceDetail,
  SubstanceListQuery,
  SubstanceRow,
} from '@/lib/schemas/substances';
import { write } from '@/models/db';
import { LotModel } from '@/models/lot';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';
import { SubstanceModel } from '@/models/substance';
import { contains, orderOf } from './lists';
import { refuseStale } from './moves';
import { record } from './record';

/** Usable stock by substance, in the ledger's millionths. */
async function stockOf(ids: readonly string[]): Promise<Map<string, number>> {
  const lots = await LotModel.findAll({
    where: { substanceId: [...ids], balanceMicro: { [Op.gt]: 0 }, heldAt: null },
    attributes: ['substanceId', 'balanceMicro'],
  });
  const stock = new Map<string, number>();
  for (const { substanceId, balanceMicro } of lots)
    stock.set(substanceId, (stock.get(substanceId) ?? 0) + balanceMicro);
  return stock;
}

function presentRow(row: SubstanceModel, micro: number): SubstanceRow {
  const { id, name, cas, formula, storageGroup, restricted, unit } = row;
  return {
    id,
    name,
    cas,
    formula,
    storageGroup,
    restricted,
    isHeld: row.heldAt !== null,
    inStock: `${fromMicro(micro)} ${unit}`,
  };
}

async function presentOne(row: SubstanceModel): Promise<SubstanceDetail> {
  const stock = await stockOf([row.id]);
  return {
    ...presentRow(row, stock.get(row.id) ?? 0),
    molarMassGPerMol: row.molarMassGPerMol,
    form: row.form,
    heldReason: row.heldReason,
    version: row.version,
  };
}

export async function listSubstances(
  _viewer: Viewer,
  query: SubstanceListQuery,
): Promise<Page<SubstanceRow>> {
  const { rows, count } = await SubstanceModel.findAndCountAll({
    where: {
      ...(query.search ? contains('searchText', query.search.toLowerCase()) : {}),
      ...(query.storageGroup ? { storageGroup: query.storageGroup } : {}),
      ...(query.held ? { heldAt: query.held === 'yes' ? { [Op.ne]: null } : null } : {}),
    },
    order: orderOf(query.sort),
    limit: query.pageSize,
    offset: (query.page - 1) * query.pageSize,
  });
  const stock = await stockOf(rows.map(({ id }) => id));
  return {
    items: rows.map((row) => presentRow(row, stock.get(row.id) ?? 0)),
    total: count,
    page: query.page,
    pageSize: query.pageSize,
  };
}

export async function getSubstance(_viewer: Viewer, id: string): Promise<SubstanceDetail> {
  const row = await SubstanceModel.findByPk(id);
  if (!row) throw new DomainError('not-found', 'There is no such substance.');
  return presentOne(row);
}

/** Stops use of everything made of a substance at once, or lifts that again. */
export async function holdSubstance(
  viewer: Viewer,
  id: string,
  { isHeld, reason, version }: Hold,
): Promise<SubstanceDetail> {
  return write(async () => {
    const row = await SubstanceModel.findByPk(id);
    if (!row) throw new DomainError('not-found', 'There is no such substance.');
    await refuseStale(row, version, () => presentOne(row));
    await row.update({
      heldAt: isHeld ? (row.heldAt ?? new Date()) : null,
      heldReason: isHeld ? reason : null,
      version: version + 1,
    });
    await record(viewer, {
      subjectType: 'substance',
      subjectId: row.id,
      subjectLabel: row.name,
      action: isHeld ? 'held' : 'hold lifted',
      reason,
    });
    return presentOne(row);
  });
}

function presentSpecies(id: string, name: string, phase: string): SpeciesRow {
  const reaction = findReaction(id);
  const formedFrom = Object.entries(reaction?.stoich ?? {})
    .map(([part, count]) => (count === 1 ? part : `${count} ${part}`))
    .join(' + ')
    .replaceAll('+ -', '− ');
  return {
    id,
    name,
    phase,
    logK: reaction?.logK ?? null,
    formedFrom: formedFrom || 'master',
    source: reaction?.source ?? '',
  };
}

/** Species come from the data files, so they are searched in memory. */
export function listSpecies(_viewer: Viewer, query: SpeciesListQuery): Page<SpeciesRow> {
  const text = query.search.toLowerCase();
  const found = ALL_SPECIES.filter(
    ({ id, name }) => id.toLowerCase().includes(text) || name.toLowerCase().includes(text),
  )
    .filter(
      ({ id }) =>
        !query.component || id === query.component || (findReaction(id)?.stoich[query.component] ?? 0) !== 0,
    )
    .map(({ id, name, phase }) => presentSpecies(id, name, phase));
  const isDescending = query.sort.startsWith('-');
  const key = query.sort.replace('-', '') as 'id' | 'name' | 'logK';
  found.sort(
    (a, b) =>
      (key === 'logK' ? (a.logK ?? -Infinity) - (b.logK ?? -Infinity) : a[key].localeCompare(b[key])) *
      (isDescending ? -1 : 1),
  );
  const start = (query.page - 1) * query.pageSize;
  return {
    items: found.slice(start, start + query.pageSize),
    total: found.length,
    page: query.page,
    pageSize: query.pageSize,
  };
}

/** Recipes in use that a substance is part of. */
export async function recipesWith(substanceId: string): Promise<{ id: string; name: string }[]> {
  const solutes = await SolutionSoluteModel.findAll({ where: { substanceId }, attributes: ['solutionId'] });
  const rows = await SolutionModel.findAll({
    where: { id: solutes.map(({ solutionId }) => solutionId), archivedAt: null },
    order: [['name', 'ASC']],
    attributes: ['id', 'name'],
  });
  return rows.map(({ id, name }) => ({ id, name }));
}
