import { precautionText } from '@/lib/hazards/classification/statements';
import type { BottleLabel } from '@/lib/schemas/bottles';

/** What to do at once with something whose label can't be trusted further. Common practice of first aid. */
const ALWAYS: readonly (readonly [saidBy: RegExp | null, text: string])[] = [
  [/P305/, 'In the eyes: rinse with water for at least 15 minutes, lids held open; get medical help.'],
  [/P30[23]/, 'On the skin: take off what is wet and rinse with plenty of water.'],
  [/P301|P33[01]/, 'Swallowed: rinse the mouth, do not make the person vomit, get medical help.'],
  [/P304/, 'Breathed in: bring the person to fresh air.'],
  [null, 'Spilt: keep others away, do not mix it with anything, tell the people named below.'],
];

/** What to do first, from the response statements of this solution, then what always holds. */
export function FirstMeasures({
  precautions,
}: {
  readonly precautions: BottleLabel['classification']['precautions'];
}) {
  const codes = precautions.filter((code) => code.startsWith('P3'));
  const responses = codes.map(precautionText);
  const further = ALWAYS.filter(([saidBy]) => saidBy === null || !codes.some((code) => saidBy.test(code)));
  return (
    <ol className="list-decimal space-y-1.5 pl-6 text-lg">
      {responses.map((text) => (
        <li key={text} className="font-semibold">
          {text}
        </li>
      ))}
      {further.map(([, text]) => (
        <li key={text}>{text}</li>
      ))}
    </ol>
  );
}
