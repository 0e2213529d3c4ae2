import { SectionLinks } from '../ui/section-links';

const PAGES = [
  ['Substances', '/catalogue'],
  ['Solutions', '/catalogue/solutions'],
  ['Species and constants', '/catalogue/species'],
] as const;

/** The shelves of the catalogue. */
export function CatalogueTabs({ here }: { readonly here: (typeof PAGES)[number][1] }) {
  return <SectionLinks label="Catalogue" links={PAGES} here={here} />;
}
