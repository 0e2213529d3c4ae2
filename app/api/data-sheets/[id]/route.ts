import { route } from '@/lib/http/route';
import { dataSheetEndpoints } from '@/lib/schemas/data-sheets';
import { readDataSheet } from '@/lib/services/data-sheets';

export const GET = route(dataSheetEndpoints.download, async ({ params }) => {
  const { fileName, bytes } = await readDataSheet(params.id);
  return new Response(new Uint8Array(bytes), {
    headers: {
      'content-type': 'application/pdf',
      'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
      'content-security-policy': "default-src 'none'; sandbox",
      'cache-control': 'private, max-age=300',
    },
  });
});
