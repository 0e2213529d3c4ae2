import 'server-only';
import { Op } from 'sequelize';
import { mayByRole } from '@/lib/domain/policy';
import type { Action } from '@/lib/domain/policy';
import type { Viewer } from '@/lib/domain/roles';
import { stateWords } from '@/lib/domain/states';
import type { SearchHit } from '@/lib/schemas/search';
import { BatchModel } from '@/models/batch';
import { BottleModel } from '@/models/bottle';
import { LotModel } from '@/models/lot';
import { OrderModel } from '@/models/order';
import { RequestModel } from '@/models/request';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { SubstanceModel } from '@/models/substance';
import { contains } from './lists';

const HITS_A_KIND = 5;

interface Shelf {
  readonly action: Action;
  find(text: string): Promise<SearchHit[]>;
}

const SHELVES: readonly Shelf[] = [
  {
    action: 'catalogue:read',
    find: async (text) => {
      const rows = await SubstanceModel.findAll({
        where: contains('searchText', text.toLowerCase()),
        order: [['name', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, name, formula, cas }) => ({
        kind: 'substance',
        id,
        label: name,
        detail: `${formula} · ${cas}`,
        href: `/catalogue/substances/${id}`,
      }));
    },
  },
  {
    action: 'catalogue:read',
    find: async (text) => {
      const rows = await SolutionModel.findAll({
        where: { ...contains('name', text), archivedAt: null },
        order: [['name', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, name }) => ({
        kind: 'solution',
        id,
        label: name,
        detail: 'recipe',
        href: `/catalogue/solutions/${id}`,
      }));
    },
  },
  {
    action: 'lab-session:read',
    find: async (text) => {
      const rows = await SessionModel.findAll({
        where: { [Op.or]: [contains('title', text), contains('course', text)] },
        order: [['startsAt', 'DESC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, course, title, startsAt }) => ({
        kind: 'session',
        id,
        label: `${course} ${title}`,
        detail: startsAt.toISOString(),
        href: `/sessions/${id}`,
      }));
    },
  },
  {
    action: 'request:read',
    find: async (text) => {
      const rows = await RequestModel.findAll({
        where: contains('code', text),
        order: [['code', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, code, state }) => ({
        kind: 'request',
        id,
        label: code,
        detail: stateWords(state),
        href: `/requests/${id}`,
      }));
    },
  },
  {
    action: 'batch:write',
    find: async (text) => {
      const rows = await BatchModel.findAll({
        where: contains('code', text),
        order: [['code', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, code, state }) => ({
        kind: 'batch',
        id,
        label: code,
        detail: stateWords(state),
        href: `/batches/${id}`,
      }));
    },
  },
  {
    action: 'stock:read',
    find: async (text) => {
      const rows = await BottleModel.findAll({
        where: contains('code', text),
        order: [['code', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, code, state, batchId }) => ({
        kind: 'bottle',
        id,
        label: code,
        detail: stateWords(state),
        href: `/batches/${batchId}`,
      }));
    },
  },
  {
    action: 'stock:read',
    find: async (text) => {
      const rows = await LotModel.findAll({
        where: { [Op.or]: [contains('code', text), contains('lotNumber', text)] },
        order: [['code', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, code, lotNumber }) => ({
        kind: 'lot',
        id,
        label: code,
        detail: `lot ${lotNumber}`,
        href: `/shelves/lots/${id}`,
      }));
    },
  },
  {
    action: 'order:read',
    find: async (text) => {
      const rows = await OrderModel.findAll({
        where: contains('code', text),
        order: [['code', 'ASC']],
        limit: HITS_A_KIND,
      });
      return rows.map(({ id, code, state }) => ({
        kind: 'order',
        id,
        label: code,
        detail: stateWords(state),
        href: `/orders/${id}`,
      }));
    },
  },
];

/** A few hits of every kind the viewer may see. */
export async function search(viewer: Viewer, text: string): Promise<SearchHit[]> {
  const found = await Promise.all(
    SHELVES.filter(({ action }) => mayByRole(viewer, action)).map((shelf) => shelf.find(text)),
  );
  return found.flat();
}
