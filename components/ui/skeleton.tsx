/** Lines where text will stand. */
export function Skeleton({ lines = 4 }: { readonly lines?: number }) {
  return (
    <div role="status" aria-label="Loading" className="space-y-3">
      {Array.from({ length: lines }, (_, line) => (
        <div
          key={line}
          className="h-5 animate-pulse rounded-sm bg-sunken"
          style={{ width: `${92 - ((line * 17) % 40)}%` }}
        />
      ))}
    </div>
  );
}
