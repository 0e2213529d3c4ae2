import { formatMolarity, formatNumber, formatVolume } from '@/lib/client/format';
import { precautionText, statementText } from '@/lib/hazards/classification/statements';
import type { BottleLabel } from '@/lib/schemas/bottles';
import { QrSquare } from '../batches/qr-square';
import { Formula } from '../chemistry/formula';
import { GhsPictogram } from '../chemistry/ghs-pictogram';
import { labelSizes } from './label-sizes';

const QR_MM = 21;

const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });

function sentence(text: string): string {
  return text.endsWith('.') ? text : `${text}.`;
}

/** A label in real millimetres, black on white whatever the theme. */
export function LabelFace({ label }: { readonly label: BottleLabel }) {
  const { signalWord, pictograms, hazards, precautions, supplemental, incomplete } = label.classification;
  const { pictogramMm, typeMm } = labelSizes(label.volumeMl, pictograms.length);
  return (
    <div
      className="h-full overflow-hidden bg-white text-black"
      style={{ fontSize: `${typeMm}mm`, lineHeight: 1.2 }}
    >
      <QrSquare
        text={label.address}
        label={`Opens what is known of ${label.bottleCode}`}
        sizeMm={QR_MM}
        className="float-right -mt-[1.5mm] -mr-[1.5mm]"
      />
      <p className="font-bold" style={{ fontSize: '1.5em', lineHeight: 1.1 }}>
        {label.solutionName}
      </p>
      <p className="font-semibold" style={{ fontSize: '1.25em' }}>
        {label.solutes.map(({ substanceId, formula, name, molarity }, index) => (
          <span key={substanceId}>
            {index > 0 && ', '}
            {formula ? <Formula id={formula} name={name} /> : name} {formatMolarity(molarity)}
          </span>
        ))}
      </p>
      <p>
        {label.strengths.map(({ substanceId, name, molarity, expandedUncertainty }) => (
          <span key={substanceId} className="mr-[1em]">
            {label.strengths.length > 1 ? `${name} ` : ''}
            {formatNumber(molarity, 4)}
            {expandedUncertainty !== null && ` ± ${formatNumber(expandedUncertainty, 2)}`} mol/L as made (k =
            2)
          </span>
        ))}
      </p>
      <p className="font-bold">
        <span className="font-mono">{label.bottleCode}</span> · {formatVolume(label.volumeMl)} · made{' '}
        {label.madeAt ? DAY.format(new Date(label.madeAt)) : '–'} · use by{' '}
        {label.useBy ? DAY.format(new Date(label.useBy)) : '–'}
      </p>
      {pictograms.length > 0 && (
        <div className="float-left mr-[1.5mm] flex">
          {pictograms.map((code) => (
            <GhsPictogram key={code} code={code} sizeMm={pictogramMm} />
          ))}
        </div>
      )}
      {signalWord && (
        <p className="font-bold uppercase" style={{ fontSize: '1.4em' }}>
          {signalWord}
        </p>
      )}
      <p className="font-semibold">
        {[...hazards.map(({ text }) => text), ...supplemental.map(statementText)].map(sentence).join(' ')}
        {hazards.length === 0 &&
          incomplete.length === 0 &&
          'By calculation no hazard class is reached; no proof that it is harmless.'}
        {incomplete.length > 0 && ` Hazards not known for: ${incomplete.join(', ')}.`}
      </p>
      {precautions.length > 0 && <p>{precautions.map(precautionText).join(' ')}</p>}
      {label.storageNote && <p>Keep: {label.storageNote}</p>}
      <p className="mt-[0.5mm]">
        {label.house.name} · {label.house.contact}
      </p>
    </div>
  );
}
