import jsQR from 'jsqr';
import { renderToStaticMarkup } from 'react-dom/server';
import { QrSquare } from '@/components/batches/qr-square';
import { LabelFace } from '@/components/bottles/label-face';
import { labelPlaces, PAPERS } from '@/components/bottles/label-geometry';
import type { LabelGeometry } from '@/components/bottles/label-geometry';
import { labelSizes } from '@/components/bottles/label-sizes';
import { classifySolution } from '@/lib/hazards/classification/classify-solution';
import type { BottleLabel } from '@/lib/schemas/bottles';

const ADDRESS = 'http://localhost:3000/b/Vf3nB0c2kq9Yx7LrT5mWz1sDh8E';
const PIXELS = 5;

/** Draws the printed path as a picture, as a printer would. */
function pictureOf(markup: string) {
  const side = Number(/viewBox="0 0 (\d+)/.exec(markup)?.[1]);
  const modules = [...markup.matchAll(/M(\d+) (\d+)h1v1h-1z/g)].map(
    (match) => [Number(match[1]), Number(match[2])] as const,
  );
  const width = side * PIXELS;
  const data = new Uint8ClampedArray(width * width * 4).fill(255);
  for (const [x, y] of modules) {
    for (let row = y * PIXELS; row < (y + 1) * PIXELS; row += 1) {
      for (let column = x * PIXELS; column < (x + 1) * PIXELS; column += 1)
        data.fill(0, (row * width + column) * 4, (row * width + column) * 4 + 3);
    }
  }
  return { side, modules, width, data };
}

describe('the square that opens a sheet or a bottle', () => {
  it('reads as its address', () => {
    const { data, width } = pictureOf(renderToStaticMarkup(<QrSquare text={ADDRESS} label="" sizeMm={20} />));
    expect(jsQR(data, width, width)?.data).toBe(ADDRESS);
  });

  it('keeps four light modules all round (ISO/IEC 18004)', () => {
    const { side, modules } = pictureOf(
      renderToStaticMarkup(<QrSquare text={ADDRESS} label="" sizeMm={20} />),
    );
    const places = modules.flat();
    expect(Math.min(...places)).toBe(4);
    expect(Math.max(...places)).toBe(side - 5);
  });
});

describe('label sheets', () => {
  it.each(Object.entries(PAPERS))('%s: every label lies on the paper and on no other', (_name, geometry) => {
    const places = labelPlaces(geometry);
    expect(places).toHaveLength(geometry.rows * geometry.columns);
    for (const [index, one] of places.entries()) {
      expect(one.leftMm + one.widthMm).toBeLessThanOrEqual(geometry.paperWidthMm + 1e-9);
      expect(one.topMm + one.heightMm).toBeLessThanOrEqual(geometry.paperHeightMm + 1e-9);
      for (const other of places.slice(index + 1)) {
        const isBeside =
          other.leftMm >= one.leftMm + one.widthMm - 1e-9 ||
          one.leftMm >= other.leftMm + other.widthMm - 1e-9;
        const isBelow = other.topMm >= one.topMm + one.heightMm - 1e-9;
        expect(isBeside || isBelow).toBe(true);
      }
    }
  });

  it('have room for what the law asks of bottles up to 3 L: 52 × 74 mm (CLP Annex I, table 1.3)', () => {
    const [place] = labelPlaces(PAPERS['A4, 2 × 4'] as LabelGeometry);
    expect(Math.min(place?.widthMm ?? 0, place?.heightMm ?? 0)).toBeGreaterThanOrEqual(52);
    expect(Math.max(place?.widthMm ?? 0, place?.heightMm ?? 0)).toBeGreaterThanOrEqual(74);
  });

  it('have none where the margins meet', () => {
    expect(
      labelPlaces({
        paperWidthMm: 50,
        paperHeightMm: 50,
        rows: 1,
        columns: 1,
        topMm: 25,
        sideMm: 1,
        rowGapMm: 0,
        columnGapMm: 0,
      }),
    ).toEqual([]);
  });
});

describe('sizes on a label', () => {
  it.each([
    [250, 16],
    [3000, 16],
    [5000, 23],
    [60_000, 32],
  ])(
    'a bottle of %i mL has signs of at least %i mm, measured along the side (CLP Annex I, table 1.3)',
    (capacityMl, sideMm) => {
      expect(labelSizes(capacityMl, 2).pictogramMm / Math.SQRT2).toBeGreaterThanOrEqual(sideMm);
    },
  );

  it('signs are never below 10 mm and letters never below 1.2 mm of x-height', () => {
    const { pictogramMm, typeMm } = labelSizes(100, 5);
    expect(pictogramMm / Math.SQRT2).toBeGreaterThanOrEqual(10);
    expect(typeMm * 0.4959).toBeGreaterThanOrEqual(1.2);
  });
});

describe('the face of a label', () => {
  const classification = classifySolution({ solutes: [{ substance: 'sodium-hydroxide', molarity: 1 }] });
  const label: BottleLabel = {
    bottleCode: 'B-0042/1',
    batchCode: 'B-0042',
    solutionName: 'Sodium hydroxide 1 mol/L',
    solutes: [{ substanceId: 'sodium-hydroxide', name: 'sodium hydroxide', formula: 'NaOH', molarity: 1 }],
    strengths: [],
    volumeMl: 500,
    madeAt: '2026-12-01T10:00:00.000Z',
    useBy: '2027-03-01T10:00:00.000Z',
    storageNote: 'Plastic bottle.',
    classification: {
      ...classification,
      pictograms: [...classification.pictograms],
      hazards: [...classification.hazards],
      precautions: [...classification.precautions],
      supplemental: [...classification.supplemental],
      incomplete: [...classification.incomplete],
    },
    house: { name: 'Larkmoor College prep room', contact: 'extension 4410', emergency: '' },
    address: ADDRESS,
  };

  it('says what it is, how strong, how old, what it does and whose it is', () => {
    const text = renderToStaticMarkup(<LabelFace label={label} />);
    for (const part of [
      'Sodium hydroxide 1 mol/L',
      'B-0042/1',
      '1 Dec 2026',
      '1 Mar 2027',
      'Danger',
      'Corrosion',
      'Causes severe skin burns and eye damage.',
      'Plastic bottle.',
      'Larkmoor College prep room',
    ]) {
      expect(text).toContain(part);
    }
  });

  it('never calls a solution harmless for want of a class', () => {
    const harmless = {
      ...label,
      classification: {
        ...label.classification,
        signalWord: null,
        pictograms: [],
        hazards: [],
        precautions: [],
      },
    };
    expect(renderToStaticMarkup(<LabelFace label={harmless} />)).toContain('no proof that it is harmless');
  });
});
