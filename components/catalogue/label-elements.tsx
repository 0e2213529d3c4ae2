import type { Classification } from '@/lib/hazards/types';
import { GhsPictogram } from '../chemistry/ghs-pictogram';
import { SignalWord } from '../chemistry/signal-word';
import { Alert } from '../ui/alert';

/** Signal word, pictograms and statements, each with its reason. */
export function LabelElements({ classification }: { readonly classification: Classification }) {
  const { signalWord, pictograms, hazards, supplemental, incomplete } = classification;
  return (
    <div>
      {incomplete.length > 0 && (
        <Alert tone="attention" title={`Incomplete: no data for ${incomplete.join(', ')}`} />
      )}
      {hazards.length === 0 && incomplete.length === 0 && (
        <p>Not classified as hazardous by calculation. The supplier’s sheet outranks it.</p>
      )}
      {pictograms.length > 0 && (
        <div className="mb-2 flex flex-wrap gap-2">
          {pictograms.map((code) => (
            <GhsPictogram key={code} code={code} className="size-20" />
          ))}
        </div>
      )}
      {signalWord && <SignalWord word={signalWord} className="mb-2 text-lg" />}
      <ul className="space-y-1.5">
        {hazards.map(({ code, text, because }) => (
          <li key={code}>
            <span className="font-mono">{code}</span> {text}
            <span className="block text-sm text-soft">{because}</span>
          </li>
        ))}
        {supplemental.map((code) => (
          <li key={code} className="font-mono">
            {code}
          </li>
        ))}
      </ul>
    </div>
  );
}
