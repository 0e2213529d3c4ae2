import 'server-only';
import ExcelJS from 'exceljs';
import type { ListColumn } from '@/lib/schemas/endpoint';

/** A spreadsheet as a download. Every text is written as text: what a user typed never becomes a formula. */
export async function workbookResponse(
  name: string,
  columns: readonly ListColumn[],
  rows: readonly (string | number | boolean | null)[][],
): Promise<Response> {
  const book = new ExcelJS.Workbook();
  const sheet = book.addWorksheet(name.slice(0, 31));
  sheet.addRow(columns.map(({ header }) => header)).font = { bold: true };
  for (const row of rows) sheet.addRow(row);
  sheet.views = [{ state: 'frozen', ySplit: 1 }];
  sheet.columns.forEach((column) => {
    column.width = 22;
  });
  const bytes = await book.xlsx.writeBuffer();
  return new Response(bytes, {
    headers: {
      'content-type': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
      'content-disposition': `attachment; filename="${name}.xlsx"`,
      'cache-control': 'no-store',
    },
  });
}
