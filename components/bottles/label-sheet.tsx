'use client';

import { useLayoutEffect, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { bottleEndpoints } from '@/lib/schemas/bottles';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { NumberInput, Select, TextInput } from '../ui/inputs';
import { labelPlaces, PAPERS } from './label-geometry';
import type { LabelGeometry } from './label-geometry';

interface LabelSheetProps {
  readonly labels: readonly {
    readonly bottleId: string;
    readonly code: string;
    readonly prints: number;
    readonly face: ReactNode;
  }[];
}

const FIELDS: readonly (readonly [key: keyof LabelGeometry, label: string, unit?: string])[] = [
  ['rows', 'Rows'],
  ['columns', 'Columns'],
  ['topMm', 'Margin above', 'mm'],
  ['sideMm', 'Margin at the side', 'mm'],
  ['rowGapMm', 'Between rows', 'mm'],
  ['columnGapMm', 'Between columns', 'mm'],
];
const FIRST = 'A4, 2 × 4';
/** Room inside a label's edge. */
const PADDING_MM = 2.5;

/** Labels laid out on sheets in real millimetres, ready to print. */
export function LabelSheet({ labels }: LabelSheetProps) {
  const [paper, setPaper] = useState(FIRST);
  const [typed, setTyped] = useState<Partial<Record<keyof LabelGeometry, string>>>({});
  const [skip, setSkip] = useState('0');
  const geometry = geometryOf(paper, typed);
  const places = labelPlaces(geometry);
  const skipped = Math.min(Math.max(0, Math.floor(Number(skip)) || 0), Math.max(0, places.length - 1));
  const cells = [...Array.from({ length: skipped }, () => null), ...labels];
  const pages = Array.from({ length: Math.ceil(cells.length / Math.max(1, places.length)) }, (_, page) =>
    cells.slice(page * places.length, (page + 1) * places.length),
  );
  const { sheetRef, overfull } = useOverfull(`${paper}${JSON.stringify(typed)}${skip}`);

  return (
    <>
      <style>{`@media print { @page { size: ${geometry.paperWidthMm}mm ${geometry.paperHeightMm}mm; margin: 0 } }`}</style>
      <div className="no-print mb-6 grid gap-4">
        <div className="flex flex-wrap items-end gap-3">
          <Select
            id="paper"
            label="Label sheet"
            value={paper}
            onChange={(event) => {
              setPaper(event.target.value);
              setTyped({});
            }}
            className="w-48"
          >
            {Object.keys(PAPERS).map((name) => (
              <option key={name}>{name}</option>
            ))}
          </Select>
          {FIELDS.map(([key, label, unit]) => (
            <NumberInput
              key={key}
              id={`sheet-${key}`}
              label={label}
              unit={unit}
              value={typed[key] ?? String(geometry[key])}
              onChange={(event) => setTyped({ ...typed, [key]: event.target.value })}
              className="w-36"
            />
          ))}
          <NumberInput
            id="skip"
            label="Labels already used"
            value={skip}
            onChange={(event) => setSkip(event.target.value)}
            className="w-44"
          />
        </div>
        {places.length === 0 && <Alert tone="stop" title="These margins leave no room for a label" />}
        {overfull.length > 0 && (
          <Alert tone="attention" title={`Not all fits on ${overfull.join(', ')}`}>
            Choose larger labels: what is cut off must be read too.
          </Alert>
        )}
        <PrintButton labels={labels} />
      </div>
      <div ref={sheetRef} className="overflow-x-auto print:overflow-visible">
        {pages.map((page, number) => (
          <div
            key={number}
            className="relative mb-4 bg-white outline outline-rule print:mb-0 print:outline-0 print:not-last:break-after-page"
            style={{ width: `${geometry.paperWidthMm}mm`, height: `${geometry.paperHeightMm - 0.2}mm` }}
          >
            {page.map((label, index) => {
              const place = places[index];
              if (!label || !place) return null;
              return (
                <div
                  key={label.bottleId}
                  data-label={label.code}
                  className="absolute border border-dashed border-[#bbb] print:border-transparent"
                  style={{
                    left: `${place.leftMm}mm`,
                    top: `${place.topMm}mm`,
                    width: `${place.widthMm}mm`,
                    height: `${place.heightMm}mm`,
                    padding: `${PADDING_MM}mm`,
                  }}
                >
                  {label.face}
                </div>
              );
            })}
          </div>
        ))}
      </div>
    </>
  );
}

function geometryOf(paper: string, typed: Partial<Record<keyof LabelGeometry, string>>): LabelGeometry {
  const base = PAPERS[paper] ?? PAPERS[FIRST];
  if (!base) throw new RangeError('no label sheet is known');
  const entries = Object.entries(typed).flatMap(([key, text]) => {
    const value = Number(text.replace(',', '.'));
    const isCount = key === 'rows' || key === 'columns';
    const isGood =
      text.trim() !== '' &&
      Number.isFinite(value) &&
      value >= (isCount ? 1 : 0) &&
      value <= 300 &&
      (!isCount || value <= 30);
    return isGood ? [[key, isCount ? Math.floor(value) : value] as const] : [];
  });
  return { ...base, ...Object.fromEntries(entries) };
}

/** Codes of labels whose content is higher than its label. */
function useOverfull(layout: string) {
  const sheetRef = useRef<HTMLDivElement>(null);
  const [overfull, setOverfull] = useState<readonly string[]>([]);
  useLayoutEffect(() => {
    const found = [...(sheetRef.current?.querySelectorAll<HTMLElement>('[data-label]') ?? [])].filter(
      (label) => {
        const face = label.firstElementChild;
        return face !== null && face.scrollHeight > face.clientHeight + 1;
      },
    );
    setOverfull(found.map((label) => label.dataset.label ?? ''));
  }, [layout]);
  return { sheetRef, overfull };
}

function PrintButton({ labels }: LabelSheetProps) {
  const [reason, setReason] = useState('');
  const [key, setKey] = useState(newIdempotencyKey);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [printed, setPrinted] = useState(labels.some(({ prints }) => prints > 0));

  const print = async () => {
    setBusy(true);
    setProblem(null);
    try {
      await callApi(bottleEndpoints.print, {
        body: { bottleIds: labels.map(({ bottleId }) => bottleId), reason },
        idempotencyKey: key,
      });
      setKey(newIdempotencyKey());
      setPrinted(true);
      setReason('');
      window.print();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
      if (error.status !== 0) setKey(newIdempotencyKey());
    } finally {
      setBusy(false);
    }
  };

  return (
    <div className="flex flex-wrap items-end gap-3">
      {printed && (
        <TextInput
          id="reprint-reason"
          label="Why are they printed again?"
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          error={problem?.errors.find(({ pointer }) => pointer === '#/reason')?.detail}
          className="min-w-72"
        />
      )}
      <Button look="primary" isBusy={isBusy} busyText="Noting it …" onClick={() => void print()}>
        Print labels
      </Button>
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
    </div>
  );
}
