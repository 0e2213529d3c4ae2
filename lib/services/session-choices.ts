import 'server-only';
import { format } from 'date-fns';
import { Op } from 'sequelize';
import type { Viewer } from '@/lib/domain/roles';
import { SessionModel } from '@/models/session';

const MOST = 200;

/** Sessions ahead that a viewer may ask for, soonest first, in words for a list. */
export async function sessionChoices(
  viewer: Viewer,
): Promise<{ id: string; words: string; benches: number }[]> {
  const sessions = await SessionModel.findAll({
    where: {
      startsAt: { [Op.gt]: new Date() },
      cancelledAt: null,
      ...(viewer.roles.includes('prep') ? {} : { instructorId: viewer.id }),
    },
    order: [['startsAt', 'ASC']],
    limit: MOST,
  });
  return sessions.map(({ id, course, title, startsAt, benches }) => ({
    id,
    benches,
    words: `${format(startsAt, 'EEE d MMM, HH:mm')} – ${course} ${title} (${benches} benches)`,
  }));
}
