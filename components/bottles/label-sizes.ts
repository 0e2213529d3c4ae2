/**
 * Sizes a label must have by what the bottle holds.
 * @see Regulation (EC) No 1272/2008 (CLP), Annex I, table 1.3: pictogram as the side of its square, which stands on
 *   its point; letter heights from Regulation (EU) 2024/2865 (secondary sources)
 */
const BY_CAPACITY = [
  { upToMl: 500, pictogramSideMm: 16.1, xHeightMm: 1.2 },
  { upToMl: 3000, pictogramSideMm: 16.1, xHeightMm: 1.4 },
  { upToMl: 50_000, pictogramSideMm: 23, xHeightMm: 1.8 },
  { upToMl: 500_000, pictogramSideMm: 32.2, xHeightMm: 2 },
] as const;

/** The least side where the label has no room for more, up to 3 L. */
const LEAST_SIDE_MM = 10;
/** More signs than this do not fit side by side in full size. */
const FULL_SIZE_SIGNS = 3;
/** Height of a small letter as part of the type size in our typeface, as a browser measures it (0.4959), rounded down. */
const X_HEIGHT_RATIO = 0.495;

export interface LabelSizes {
  /** Of the box around the sign, from point to point. */
  readonly pictogramMm: number;
  readonly typeMm: number;
}

/** Pictogram and type size for a bottle. */
export function labelSizes(capacityMl: number, pictograms: number): LabelSizes {
  const row = BY_CAPACITY.find(({ upToMl }) => capacityMl <= upToMl) ?? BY_CAPACITY[3];
  const side = pictograms > FULL_SIZE_SIGNS && capacityMl <= 3000 ? LEAST_SIDE_MM : row.pictogramSideMm;
  return { pictogramMm: side * Math.SQRT2, typeMm: row.xHeightMm / X_HEIGHT_RATIO };
}
