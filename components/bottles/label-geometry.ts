/** How labels lie on a sheet; everything in millimetres. A roll is a sheet of one label. */
export interface LabelGeometry {
  readonly paperWidthMm: number;
  readonly paperHeightMm: number;
  readonly rows: number;
  readonly columns: number;
  readonly topMm: number;
  readonly sideMm: number;
  readonly rowGapMm: number;
  readonly columnGapMm: number;
}

export const PAPERS: Readonly<Record<string, LabelGeometry>> = {
  'A4, 2 × 4': {
    paperWidthMm: 210,
    paperHeightMm: 297,
    rows: 4,
    columns: 2,
    topMm: 13,
    sideMm: 4.7,
    rowGapMm: 0,
    columnGapMm: 2.5,
  },
  'A4, 2 × 2': {
    paperWidthMm: 210,
    paperHeightMm: 297,
    rows: 2,
    columns: 2,
    topMm: 4.5,
    sideMm: 5,
    rowGapMm: 0,
    columnGapMm: 1.6,
  },
  'Letter, 2 × 3': {
    paperWidthMm: 215.9,
    paperHeightMm: 279.4,
    rows: 3,
    columns: 2,
    topMm: 12.7,
    sideMm: 4,
    rowGapMm: 0,
    columnGapMm: 4.8,
  },
  'Roll, 102 × 76': {
    paperWidthMm: 102,
    paperHeightMm: 76,
    rows: 1,
    columns: 1,
    topMm: 2,
    sideMm: 2,
    rowGapMm: 0,
    columnGapMm: 0,
  },
};

export interface LabelPlace {
  readonly leftMm: number;
  readonly topMm: number;
  readonly widthMm: number;
  readonly heightMm: number;
}

/**
 * Places of the labels of one sheet, row by row.
 * @returns nothing where the margins leave no room
 */
export function labelPlaces(geometry: LabelGeometry): LabelPlace[] {
  const { rows, columns, topMm, sideMm, rowGapMm, columnGapMm } = geometry;
  const widthMm = (geometry.paperWidthMm - 2 * sideMm - (columns - 1) * columnGapMm) / columns;
  const heightMm = (geometry.paperHeightMm - 2 * topMm - (rows - 1) * rowGapMm) / rows;
  if (!(widthMm > 0 && heightMm > 0)) return [];
  return Array.from({ length: rows * columns }, (_, index) => ({
    leftMm: sideMm + (index % columns) * (widthMm + columnGapMm),
    topMm: topMm + Math.floor(index / columns) * (heightMm + rowGapMm),
    widthMm,
    heightMm,
  }));
}
