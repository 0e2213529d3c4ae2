import 'server-only';
import { DomainError, invalid } from '@/lib/domain/errors';
import { pointerOf } from './problem';

const DEFAULT_LIMIT_BYTES = 256 * 1024;

/**
 * Reads a body up to a limit, however it is sent.
 * @throws DomainError `too-large` as soon as the limit is passed
 */
export async function readBytes(request: Request, limitBytes = DEFAULT_LIMIT_BYTES): Promise<Buffer> {
  const tooLarge = () => new DomainError('too-large', `The body may have at most ${limitBytes} bytes.`);
  if (Number(request.headers.get('content-length') ?? 0) > limitBytes) throw tooLarge();
  if (!request.body) return Buffer.alloc(0);
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    size += chunk.byteLength;
    if (size > limitBytes) throw tooLarge();
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

/** @throws DomainError `unsupported-type`, `too-large`, `malformed`, or `invalid` where a number is not one */
export async function readJson(request: Request, limitBytes?: number): Promise<unknown> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\b/i.test(type))
    throw new DomainError('unsupported-type', 'Send application/json.');
  const text = (await readBytes(request, limitBytes)).toString('utf8');
  try {
    return JSON.parse(text) as unknown;
  } catch (cause) {
    const pointers = pointersOfNonNumbers(text);
    if (pointers.length > 0) {
      throw invalid(pointers.map((pointer) => ({ pointer, detail: 'Not a finite number.' })));
    }
    throw new DomainError('malformed', 'The body could not be read as JSON.', { cause });
  }
}

/** Where a body is JSON but for NaN or Infinity, the fields that hold them. */
function pointersOfNonNumbers(text: string): string[] {
  const marker = '\u0000not a number';
  const mended = text.replaceAll(/(?<=[:,[]\s*)-?(?:NaN|Infinity)(?=\s*[,}\]])/g, JSON.stringify(marker));
  let value: unknown;
  try {
    value = JSON.parse(mended);
  } catch {
    return [];
  }
  const found: string[] = [];
  const visit = (node: unknown, path: PropertyKey[]) => {
    if (node === marker) found.push(pointerOf(path));
    else if (Array.isArray(node)) node.forEach((child, index) => visit(child, [...path, index]));
    else if (node && typeof node === 'object')
      Object.entries(node).forEach(([key, child]) => visit(child, [...path, key]));
  };
  visit(value, []);
  return found;
}
