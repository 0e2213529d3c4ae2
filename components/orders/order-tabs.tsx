import { SectionLinks } from '../ui/section-links';

const PAGES = [
  ['Orders', '/orders'],
  ['Shortages', '/orders/shortages'],
] as const;

/** Orders, and what they are to answer. */
export function OrderTabs({ here }: { readonly here: (typeof PAGES)[number][1] }) {
  return <SectionLinks label="Orders" links={PAGES} here={here} />;
}
