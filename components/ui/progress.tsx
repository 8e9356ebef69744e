/** How far a piece of slow work has come, in figures as well as in length. */
export function Progress({ done, total, label }: { done: number; total: number | null; label: string }) {
  const percent = total ? Math.min(100, Math.round((done * 100) / total)) : null;
  return (
    <div>
      <div className="mb-1 flex justify-between gap-3 text-small text-ink-2">
        <span>{label}</span>
        <span className="num">{total === null ? 'starting' : `${done} of ${total}`}</span>
      </div>
      <div role="progressbar" aria-label={label} aria-valuemin={0} aria-valuemax={total ?? undefined} aria-valuenow={total === null ? undefined : done} className="h-2 overflow-hidden rounded-full bg-wash">
        <div className="h-full rounded-full bg-brass-fill transition-[width] duration-150" style={{ width: `${percent ?? 5}%` }} />
      </div>
    </div>
  );
}
