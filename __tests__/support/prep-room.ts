import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { addDays, formatISO } from 'date-fns';
import { findSubstance } from '@/lib/chemistry/substances';
import { toMicro } from '@/lib/domain/quantities';
import type { ToleranceClass } from '@/lib/domain/quantities';
import type { Role, Viewer } from '@/lib/domain/roles';
import { classifySolution } from '@/lib/hazards/classification/classify-solution';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import { nextCode } from '@/lib/services/codes';
import { addLot } from '@/lib/services/lots';
import { closeDatabase, database, write } from '@/models/db';
import { EquipmentModel } from '@/models/equipment';
import type { LotModel } from '@/models/lot';
import { migrateUp } from '@/models/migrate';
import { PlaceModel } from '@/models/place';
import { PlanModel } from '@/models/plan';
import { RequestModel } from '@/models/request';
import { ReviewModel } from '@/models/review';
import { RoomModel } from '@/models/room';
import { SessionModel } from '@/models/session';
import { SolutionModel } from '@/models/solution';
import { SolutionSoluteModel } from '@/models/solution-solute';
import { SubstanceModel } from '@/models/substance';
import { UserModel } from '@/models/user';

/** A migrated database of its own, with a furnished prep room and nothing on its shelves. */
export interface PrepRoom {
  readonly prep: Viewer;
  readonly instructor: Viewer;
  readonly safety: Viewer;
  readonly placeId: string;
  readonly roomId: string;
  close(): Promise<void>;
}

let people = 0;

export async function buildPerson(roles: Role[]): Promise<Viewer> {
  people += 1;
  const user = await UserModel.create({
    email: `person-${people}@larkmoor.example`,
    name: `Person ${people}`,
    passwordHash: 'none',
    roles,
  });
  return { id: user.id, name: user.name, email: user.email, roles, approvalLimitMinor: 0 };
}

export async function openPrepRoom(): Promise<PrepRoom> {
  const directory = mkdtempSync(path.join(tmpdir(), 'benchwright-'));
  process.env.DATA_DIR = directory;
  process.env.LOG_LEVEL = 'silent';
  await migrateUp(database());
  const room = await RoomModel.create({ name: 'Prep room', volumeM3: 100, airChangesPerHour: 6 });
  const place = await PlaceModel.create({
    roomId: room.id,
    name: 'Salts',
    kind: 'shelf',
    storageGroup: 'general',
  });
  await EquipmentModel.bulkCreate([
    {
      roomId: room.id,
      kind: 'balance',
      name: 'Balance 0.1 mg',
      capacityG: 220,
      readabilityG: 0.0001,
      repeatabilityG: 0.0001,
    },
    {
      roomId: room.id,
      kind: 'balance',
      name: 'Balance 10 mg',
      capacityG: 3200,
      readabilityG: 0.01,
      repeatabilityG: 0.01,
    },
    ...[100, 250, 500, 1000].map((capacityMl) => ({
      roomId: room.id,
      kind: 'flask' as const,
      name: `${capacityMl} mL flask`,
      capacityMl,
      glassClass: 'A',
    })),
    ...[10, 25, 50].map((capacityMl) => ({
      roomId: room.id,
      kind: 'pipette' as const,
      name: `${capacityMl} mL pipette`,
      capacityMl,
      glassClass: 'A',
    })),
    ...[25, 100].map((capacityMl) => ({
      roomId: room.id,
      kind: 'cylinder' as const,
      name: `${capacityMl} mL cylinder`,
      capacityMl,
      glassClass: 'B',
    })),
  ]);
  const [prep, instructor, safety] = await Promise.all([
    buildPerson(['prep']),
    buildPerson(['instructor']),
    buildPerson(['safety']),
  ]);
  return {
    prep,
    instructor,
    safety,
    placeId: place.id,
    roomId: room.id,
    close: async () => {
      await closeDatabase();
      rmSync(directory, { recursive: true, force: true });
    },
  };
}

export async function buildSubstance(id: string): Promise<SubstanceModel> {
  const known = await SubstanceModel.findByPk(id);
  if (known) return known;
  const substance = findSubstance(id);
  if (!substance) throw new Error(`${id} is not in the catalogue`);
  const { name, cas, formula, molarMassGPerMol, form } = substance;
  return SubstanceModel.create({
    id,
    name,
    cas,
    formula,
    molarMassGPerMol,
    form,
    unit: form === 'solid' ? 'g' : 'mL',
    storageGroup: 'general',
    searchText: `${name} ${cas}`,
  });
}

export async function buildLot(
  house: PrepRoom,
  lot: { substanceId: string; amount: number; assayPercent?: number; expiresInDays?: number | null },
): Promise<LotModel> {
  const substance = await buildSubstance(lot.substanceId);
  const expiresInDays = lot.expiresInDays === undefined ? 300 : lot.expiresInDays;
  const day = (offset: number) => formatISO(addDays(new Date(), offset), { representation: 'date' });
  return write(() =>
    addLot(house.prep, {
      substance,
      lotNumber: 'A1',
      assayPercent: lot.assayPercent ?? null,
      amountMicro: toMicro(lot.amount),
      receivedOn: day(-30),
      expiresOn: expiresInDays === null ? null : day(expiresInDays),
      placeId: house.placeId,
      supplierId: null,
      reason: 'Opening count',
    }),
  );
}

export async function buildSolution(solute: {
  substanceId: string;
  molarity: number;
  tolerance?: ToleranceClass;
  shelfLifeDays?: number;
}): Promise<SolutionModel> {
  await buildSubstance(solute.substanceId);
  const solution = await SolutionModel.create({
    name: `${solute.substanceId} ${solute.molarity} mol/L`,
    shelfLifeDays: solute.shelfLifeDays ?? 60,
    toleranceClass: solute.tolerance ?? 'ordinary',
  });
  await SolutionSoluteModel.create({
    solutionId: solution.id,
    position: 0,
    substanceId: solute.substanceId,
    molarity: solute.molarity,
  });
  return solution;
}

/** An agreed request with a frozen plan for these volumes of solutions. */
export async function buildAgreedRequest(
  house: PrepRoom,
  wanted: readonly { solution: SolutionModel; volumeMl: number }[],
  about: { inDays?: number; conditions?: string[] } = {},
): Promise<RequestModel> {
  const startsAt = addDays(new Date(), about.inDays ?? 5);
  const session = await SessionModel.create({
    course: 'CH101',
    title: 'Complexes',
    startsAt,
    endsAt: new Date(startsAt.getTime() + 7_200_000),
    roomId: house.roomId,
    benches: 10,
    instructorId: house.instructor.id,
  });
  const solutions = await Promise.all(
    wanted.map(async ({ solution, volumeMl }) => {
      const rows = await SolutionSoluteModel.findAll({ where: { solutionId: solution.id } });
      const solutes = rows.map(({ substanceId, molarity }) => ({ substance: substanceId, molarity }));
      return {
        solutionId: solution.id,
        name: solution.name,
        solutes: solutes.map((solute) => ({ ...solute, name: solute.substance, formula: '' })),
        volumeMl,
        shelfLifeDays: solution.shelfLifeDays,
        classification: classifySolution({ solutes }),
      };
    }),
  );
  const plan: RequestPlan = {
    session: {
      course: 'CH101',
      title: 'Complexes',
      startsAt: startsAt.toISOString(),
      roomName: 'Prep room',
      room: { volumeM3: 100, airChangesPerHour: 6, fumeCupboard: true },
      benches: 10,
    },
    solutions,
    demonstrations: [],
    substances: [],
    findings: [],
    decision: 'clear',
  };
  const code = await write(() => nextCode('request'));
  const hash = `plan of ${code}`;
  const request = await RequestModel.create({
    code,
    sessionId: session.id,
    requesterId: house.instructor.id,
    state: 'agreed',
    planHash: hash,
  });
  const row = await PlanModel.create({
    requestId: request.id,
    hash,
    decision: 'clear',
    content: { ...plan },
  });
  if (about.conditions) {
    await ReviewModel.create({
      requestId: request.id,
      planId: row.id,
      planHash: hash,
      state: 'agreed-with-conditions',
      gravity: 1,
      conditions: about.conditions,
      reviewerId: house.safety.id,
    });
  }
  return request;
}
