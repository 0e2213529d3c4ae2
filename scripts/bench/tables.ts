import os from 'node:os';

type Line = Readonly<Record<string, unknown>>;

function cell(value: unknown): string {
  if (typeof value === 'number')
    return Math.abs(value) > 0 && Math.abs(value) < 1e-3
      ? value.toExponential(1)
      : String(Number(value.toPrecision(4)));
  if (typeof value !== 'object' || value === null) return String(value ?? '');
  const { medianUs, p95Us } = value as { readonly medianUs: number; readonly p95Us: number };
  return `${medianUs} / ${p95Us}`;
}

/** Lines with the same fields make one table, in the order of their first line. */
function tableOf(lines: readonly Line[]): string {
  const fields = Object.keys(lines[0] ?? {});
  const row = (cells: readonly string[]) => `| ${cells.join(' | ')} |`;
  return [
    row(fields),
    row(fields.map(() => '---')),
    ...lines.map((line) => row(fields.map((field) => cell(line[field])))),
  ].join('\n');
}

/** The results as a page of the documentation. */
export function benchmarkTables(lines: readonly Line[]): string {
  const byShape = new Map<string, Line[]>();
  for (const line of lines) {
    const shape = Object.keys(line).join(' ');
    byShape.set(shape, [...(byShape.get(shape) ?? []), line]);
  }
  const [processor] = os.cpus();
  return `# How fast the computing core is

Written by \`npm run bench\`; do not edit. Node.js ${process.versions.node} on ${os.cpus().length} × ${processor?.model ?? 'an unknown processor'}.
Times are median / 95th percentile in µs unless a column says ms. *floor*: six times one exponential per dissolved
species and one Cholesky factorisation of the order of the components, measured in turn with the rest. *cold*: the
solver from nothing. *warm*: from the answer at a total 0.2 % away. *wholeAnswer*: reactions gathered, solved and
written out with its notes.

${[...byShape.values()].map(tableOf).join('\n\n')}
`;
}
