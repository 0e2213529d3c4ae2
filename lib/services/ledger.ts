import 'server-only';
import { literal, Op } from 'sequelize';
import { DomainError } from '@/lib/domain/errors';
import { fromMicro } from '@/lib/domain/quantities';
import type { Viewer } from '@/lib/domain/roles';
import type { MovementKind } from '@/lib/domain/states';
import { currentTransaction } from '@/models/db';
import { LotModel } from '@/models/lot';
import { MovementModel } from '@/models/movement';

export interface Move {
  readonly lotId: string;
  readonly kind: MovementKind;
  /** Integer millionths of the lot's unit; negative where stock falls. */
  readonly amountMicro: number;
  readonly reason?: string;
  readonly batchId?: string;
  readonly receiptId?: string;
}

/**
 * Writes one line of the stock ledger and keeps the lot's balance with it. The condition on the balance is
 * part of the update itself, so stock can't fall below nothing however many write at once.
 * @throws DomainError `not-enough` where the lot holds less; TypeError outside a write
 */
export async function move(viewer: Pick<Viewer, 'id'>, line: Move): Promise<MovementModel> {
  if (!currentTransaction()) throw new TypeError('move() belongs inside write()');
  if (!Number.isSafeInteger(line.amountMicro) || line.amountMicro === 0)
    throw new RangeError('A movement moves a whole number of millionths');
  const [changed] = await LotModel.update(
    { balanceMicro: literal(`"balanceMicro" + ${line.amountMicro}`) as unknown as number },
    { where: { id: line.lotId, balanceMicro: { [Op.gte]: Math.max(0, -line.amountMicro) } } },
  );
  const lot = await LotModel.findByPk(line.lotId);
  if (!lot) throw new DomainError('not-found', 'There is no such lot.');
  if (changed === 0) {
    throw new DomainError(
      'not-enough',
      `Lot ${lot.code} holds ${fromMicro(lot.balanceMicro)} ${lot.unit}; ${fromMicro(-line.amountMicro)} ${lot.unit} is asked for.`,
    );
  }
  return MovementModel.create({ ...line, balanceAfterMicro: lot.balanceMicro, actorId: viewer.id });
}
