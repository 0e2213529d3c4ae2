/** How far something has come, with what is being done. */
export function Progress({
  label,
  done,
  total,
}: {
  readonly label: string;
  readonly done: number;
  readonly total: number;
}) {
  return (
    <div>
      <div className="mb-1 flex justify-between text-sm">
        <span>{label}</span>
        <span className="font-mono">
          {done} / {total}
        </span>
      </div>
      <progress className="h-2 w-full accent-verdigris" value={done} max={total} aria-label={label} />
    </div>
  );
}
