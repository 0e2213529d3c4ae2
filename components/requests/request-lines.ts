import type { RequestLineInput } from '@/lib/schemas/requests';

/** A line as it is typed: figures are text until they are read. */
export interface TypedLine {
  readonly key: string;
  readonly kind: 'solution' | 'demonstration';
  readonly id: string;
  readonly name: string;
  readonly volumePerBenchMl: string;
  readonly spareBenches: string;
  readonly performances: string;
}

let made = 0;
export function newLine(kind: TypedLine['kind']): TypedLine {
  made += 1;
  return {
    key: `line-${made}`,
    kind,
    id: '',
    name: '',
    volumePerBenchMl: '',
    spareBenches: '1',
    performances: '1',
  };
}

export function typedLine(line: RequestLineInput, name: string): TypedLine {
  const blank = newLine(line.kind);
  return line.kind === 'solution'
    ? {
        ...blank,
        id: line.solutionId,
        name,
        volumePerBenchMl: String(line.volumePerBenchMl),
        spareBenches: String(line.spareBenches),
      }
    : { ...blank, id: line.demonstrationId, name, performances: String(line.performances) };
}

/** A typed figure; a comma is a decimal sign, and blank is no number. */
export function readFigure(text: string): number {
  const plain = text.trim().replace(',', '.').replaceAll(/\s/g, '');
  return plain === '' ? NaN : Number(plain);
}

/** What is sent; figures that can't be read become null, which the server names. */
export function lineToSend(line: TypedLine): RequestLineInput {
  return line.kind === 'solution'
    ? {
        kind: 'solution',
        solutionId: line.id,
        volumePerBenchMl: readFigure(line.volumePerBenchMl),
        spareBenches: readFigure(line.spareBenches),
      }
    : { kind: 'demonstration', demonstrationId: line.id, performances: readFigure(line.performances) };
}

/** Whether a line says enough to be planned already. */
export function isPlannable(line: TypedLine): boolean {
  if (line.id === '') return false;
  return line.kind === 'solution'
    ? readFigure(line.volumePerBenchMl) > 0 && readFigure(line.spareBenches) >= 0
    : readFigure(line.performances) >= 1;
}
