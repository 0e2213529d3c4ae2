import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { RequestPlan } from '@/lib/planning/request-plan-types';
import { demonstrationEndpoints } from '@/lib/schemas/demonstrations';
import type { Demonstration } from '@/lib/schemas/demonstrations';
import { requestEndpoints } from '@/lib/schemas/requests';
import type { RequestLineInput } from '@/lib/schemas/requests';
import { solutionEndpoints } from '@/lib/schemas/solutions';
import type { Solution } from '@/lib/schemas/solutions';
import { callApi } from './api';

export const requestKeys = {
  lists: () => [requestEndpoints.list.path, 'list'] as const,
  plan: (sessionId: string, lines: readonly RequestLineInput[]) =>
    ['plan-preview', sessionId, lines] as const,
};

/** The plan of lines that are being typed; the last one stays in view meanwhile. */
export function planPreviewOptions(
  sessionId: string,
  requestId: string | null,
  lines: readonly RequestLineInput[],
) {
  return queryOptions({
    queryKey: requestKeys.plan(sessionId, lines),
    queryFn: async ({ signal }) =>
      (await callApi(requestEndpoints.previewPlan, {
        body: { sessionId, requestId, lines: [...lines] },
        signal,
      })) as unknown as RequestPlan,
    enabled: sessionId !== '' && lines.length > 0,
    placeholderData: keepPreviousData,
    retry: false,
  });
}

const CHOICES = 12;

export async function findSolutions(text: string, signal: AbortSignal): Promise<readonly Solution[]> {
  return (await callApi(solutionEndpoints.list, { query: { search: text, pageSize: CHOICES }, signal }))
    .items;
}

export async function findDemonstrations(
  text: string,
  signal: AbortSignal,
): Promise<readonly Demonstration[]> {
  return (await callApi(demonstrationEndpoints.list, { query: { search: text, pageSize: CHOICES }, signal }))
    .items;
}
