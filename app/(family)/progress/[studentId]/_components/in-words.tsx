import type { ProgressWords } from '@/lib/ladder/progress-words';

/** What can be played now, what it sounds like, what comes next; no music theory needed. */
export function InWords({ words: { now, sound, next, when } }: { words: ProgressWords }) {
  return (
    <div className="mt-3 grid max-w-[58ch] gap-2">
      <p className="text-lead font-semibold">{now}</p>
      {sound ? <p className="text-ink-2">{sound}</p> : null}
      <p>{next}</p>
      {when ? <p className="text-ink-2">{when}</p> : null}
    </div>
  );
}
