import { precautionText, statementText } from '@/lib/hazards/classification/statements';
import type { BottleLabel } from '@/lib/schemas/bottles';
import { GhsPictogram } from '../chemistry/ghs-pictogram';
import { SignalWord } from '../chemistry/signal-word';

/** Signs and statements of a solution as diluted, each statement with its reason. */
export function HazardBlock({ classification }: { readonly classification: BottleLabel['classification'] }) {
  const { signalWord, pictograms, hazards, precautions, supplemental, incomplete } = classification;
  return (
    <div className="flex flex-wrap items-start gap-5">
      {pictograms.length > 0 && (
        <div className="flex gap-2">
          {pictograms.map((code) => (
            <GhsPictogram key={code} code={code} sizeMm={16} />
          ))}
        </div>
      )}
      <div className="min-w-0 flex-1">
        {signalWord && <SignalWord word={signalWord} className="mb-1 text-lg" />}
        {hazards.length === 0 && incomplete.length === 0 && (
          <p>
            By calculation no hazard class is reached at this strength. That is no proof that it is harmless.
          </p>
        )}
        <ul>
          {hazards.map(({ code, text, because }) => (
            <li key={code}>
              <span className="font-mono text-sm">{code}</span> {text}{' '}
              <span className="text-sm text-soft">({because})</span>
            </li>
          ))}
          {supplemental.map((code) => (
            <li key={code}>
              <span className="font-mono text-sm">{code}</span> {statementText(code)}
            </li>
          ))}
        </ul>
        {precautions.length > 0 && (
          <p className="mt-1 text-sm">{precautions.map(precautionText).join(' ')}</p>
        )}
        {incomplete.length > 0 && (
          <p className="mt-1 font-semibold">
            Without hazard data: {incomplete.join(', ')}. Treat it as hazardous and read the data sheet.
          </p>
        )}
      </div>
    </div>
  );
}
