'use client';

import { Button } from '../ui/button';

/** A fault of ours: what to do, and the number that finds it in the log. No details of the fault itself. */
export function Fault({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <div role="alert" className="flex flex-col items-start gap-3 px-4 py-12">
      <h1 className="text-h1">This did not work</h1>
      <p className="max-w-[52ch] text-ink-2">The fault is on our side and has been noted. Try again; if it happens twice, tell the school’s owner this number.</p>
      {error.digest ? <p className="num rounded bg-wash px-3 py-1 font-semibold">Fault {error.digest}</p> : null}
      <Button kind="primary" onClick={reset}>Try again</Button>
    </div>
  );
}
