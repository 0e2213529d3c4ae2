import { readBytes } from '@/lib/http/body';
import { invalid } from '@/lib/domain/errors';
import { route } from '@/lib/http/route';
import { DATA_SHEET_LIMIT_BYTES, dataSheetEndpoints } from '@/lib/schemas/data-sheets';
import { addDataSheet, listDataSheets } from '@/lib/services/data-sheets';

/** What the form around the file may add to its size. */
const FORM_OVERHEAD_BYTES = 64 * 1024;

export const GET = route(dataSheetEndpoints.list, async ({ params }) => ({
  items: await listDataSheets(params.id),
}));

export const POST = route(dataSheetEndpoints.upload, async ({ request, viewer, params }) => {
  const body = await readBytes(request, DATA_SHEET_LIMIT_BYTES + FORM_OVERHEAD_BYTES);
  const contentType = request.headers.get('content-type') ?? '';
  const form = await new Response(new Uint8Array(body), { headers: { 'content-type': contentType } })
    .formData()
    .catch(() => null);
  const file = form?.get('file');
  if (!(file instanceof File)) throw invalid([{ pointer: '#/file', detail: 'Choose a PDF.' }]);
  return addDataSheet(viewer, params.id, file.name, Buffer.from(await file.arrayBuffer()));
});
