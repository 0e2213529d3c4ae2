import { formulaParts } from './formula-parts';

/** A formula as the trade writes it, from its plain id. With a name, that is what a screen reader says. */
export function Formula({ id, name }: { readonly id: string; readonly name?: string }) {
  const typeset = formulaParts(id).map(({ text, place }, index) =>
    place === 'sub' ? (
      <sub key={index} className="text-[0.72em] leading-none">
        {text}
      </sub>
    ) : place === 'super' ? (
      <sup key={index} className="text-[0.72em] leading-none">
        {text}
      </sup>
    ) : (
      <span key={index}>{text}</span>
    ),
  );
  if (!name) return <span className="whitespace-nowrap">{typeset}</span>;
  return (
    <span className="whitespace-nowrap">
      <span aria-hidden>{typeset}</span>
      <span className="sr-only">{name}</span>
    </span>
  );
}
