import 'server-only';
import { createHash, randomUUID } from 'node:crypto';
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { DomainError, invalid } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { DataSheet } from '@/lib/schemas/data-sheets';
import { DataSheetModel } from '@/models/data-sheet';
import { dataDirectory, write } from '@/models/db';
import { SubstanceModel } from '@/models/substance';
import { UserModel } from '@/models/user';
import { record } from './record';

const MOST_SHEETS = 20;

function folder(): string {
  return path.join(dataDirectory(), 'data-sheets');
}

/** A PDF starts with its mark and ends with its trailer, wherever it came from. */
export function looksLikePdf(bytes: Buffer): boolean {
  return (
    bytes.subarray(0, 5).toString('latin1') === '%PDF-' &&
    bytes.subarray(-1024).toString('latin1').includes('%%EOF')
  );
}

/** A name safe to show and to send back: no folders, no control letters, at most 120 long. */
function safeName(name: string): string {
  const last = name.split(/[\\/]/).at(-1) ?? '';
  const plain = last
    .replaceAll(/[\p{Cc}"<>|:*?]/gu, '')
    .trim()
    .slice(0, 120);
  return /\.pdf$/i.test(plain) ? plain : `${plain || 'data-sheet'}.pdf`;
}

export async function listDataSheets(substanceId: string): Promise<DataSheet[]> {
  const rows = await DataSheetModel.findAll({ where: { substanceId }, order: [['createdAt', 'DESC']] });
  const people = await UserModel.findAll({ where: { id: rows.map(({ uploadedById }) => uploadedById) } });
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return rows.map((row) => present(row, names.get(row.uploadedById) ?? ''));
}

function present(row: DataSheetModel, uploadedBy: string): DataSheet {
  return {
    id: row.id,
    fileName: row.fileName,
    sizeBytes: row.sizeBytes,
    uploadedBy,
    uploadedAt: row.createdAt.toISOString(),
  };
}

/**
 * Keeps a data sheet under a random name outside the public folder.
 * @throws DomainError `invalid` where the content is no PDF or the substance has too many already
 */
export async function addDataSheet(
  viewer: Viewer,
  substanceId: string,
  name: string,
  bytes: Buffer,
): Promise<DataSheet> {
  if (!looksLikePdf(bytes)) throw invalid([{ pointer: '#/file', detail: 'This is not a PDF.' }]);
  const storedName = `${randomUUID()}.pdf`;
  await mkdir(folder(), { recursive: true });
  const file = path.join(folder(), storedName);
  await writeFile(file, bytes, { flag: 'wx' });
  try {
    return await write(async () => {
      const substance = await SubstanceModel.findByPk(substanceId);
      if (!substance) throw new DomainError('not-found', 'There is no such substance.');
      if ((await DataSheetModel.count({ where: { substanceId } })) >= MOST_SHEETS) {
        throw invalid([{ pointer: '#/file', detail: `A substance keeps ${MOST_SHEETS} sheets at most.` }]);
      }
      const sha256 = createHash('sha256').update(bytes).digest('hex');
      const row = await DataSheetModel.create({
        substanceId,
        fileName: safeName(name),
        storedName,
        sizeBytes: bytes.length,
        sha256,
        uploadedById: viewer.id,
      });
      await record(viewer, {
        subjectType: 'substance',
        subjectId: substanceId,
        subjectLabel: substance.name,
        action: 'data sheet added',
        detail: { fileName: row.fileName, sha256 },
      });
      return present(row, viewer.name);
    });
  } catch (error) {
    await rm(file, { force: true });
    throw error;
  }
}

/** @throws DomainError `not-found` where the sheet, or its file, is gone */
export async function readDataSheet(id: string): Promise<{ fileName: string; bytes: Buffer }> {
  const row = await DataSheetModel.findByPk(id);
  if (!row) throw new DomainError('not-found', 'There is no such data sheet.');
  try {
    return { fileName: row.fileName, bytes: await readFile(path.join(folder(), row.storedName)) };
  } catch (cause) {
    throw new DomainError('not-found', 'The file of this data sheet is missing; upload it again.', { cause });
  }
}
