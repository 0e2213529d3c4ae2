import 'server-only';
import type { Viewer } from '@/lib/domain/roles';
import { BatchRequestModel } from '@/models/batch-request';
import { BottleModel } from '@/models/bottle';
import { RequestModel } from '@/models/request';
import { rowsById } from './lookup';
import { changeState } from './moves';
import { isAllBottled } from './needs';

/** Requests a batch was planned for. */
async function servedBy(batchId: string): Promise<RequestModel[]> {
  const links = await BatchRequestModel.findAll({ where: { batchId } });
  return [
    ...(
      await rowsById(
        RequestModel,
        links.map(({ requestId }) => requestId),
      )
    ).values(),
  ];
}

/** Requests for which all now stands in bottles become ready. */
export async function readyWhatIsBottled(viewer: Viewer, batchId: string): Promise<void> {
  for (const request of await servedBy(batchId)) {
    if (request.state === 'in-work' && (await isAllBottled(request))) {
      await changeState(viewer, 'request', request, 'ready', {
        label: request.code,
        reason: 'All it needs stands in bottles',
      });
    }
  }
}

/** Requests that were ready and lost something go back into work. */
export async function reopenUncovered(viewer: Viewer, batchId: string): Promise<void> {
  for (const request of await servedBy(batchId)) {
    if (request.state === 'ready' && !(await isAllBottled(request))) {
      await changeState(viewer, 'request', request, 'in-work', {
        label: request.code,
        reason: 'Something made for it was discarded',
      });
    }
  }
}

/** A ready request of which every bottle left the prep room is handed over. */
export async function closeHandOver(viewer: Viewer, request: RequestModel): Promise<void> {
  if (request.state !== 'ready') return;
  const waiting = await BottleModel.count({
    where: { requestId: request.id, state: ['filled', 'returned'] },
  });
  if (waiting === 0) await changeState(viewer, 'request', request, 'handed-over', { label: request.code });
}
