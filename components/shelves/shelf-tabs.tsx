import { SectionLinks } from '../ui/section-links';

const PAGES = [
  ['Cabinets', '/shelves'],
  ['Lots', '/shelves/lots'],
  ['Bottles', '/shelves/bottles'],
  ['Ledger', '/shelves/ledger'],
] as const;

/** The ways of looking at what stands in the house. */
export function ShelfTabs({ here }: { readonly here: (typeof PAGES)[number][1] }) {
  return <SectionLinks label="Shelves" links={PAGES} here={here} />;
}
