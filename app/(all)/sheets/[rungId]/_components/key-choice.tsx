import { Button } from '@/components/ui/button';
import { printedNote } from '@/lib/harmony/note';

/** Which keys are on the sheet; a plain form, so that the address can be kept. */
export function KeyChoice({ rungId, pool, chosen }: { rungId: string; pool: readonly string[]; chosen: readonly string[] }) {
  return (
    <form method="get" action={`/sheets/${rungId}`} className="no-print flex flex-wrap items-center gap-2" aria-label="Keys on this sheet">
      {pool.map((key) => (
        <label key={key} className="flex items-center gap-2 rounded border border-rule px-3 py-[6px] has-checked:border-ink has-checked:bg-wash tap">
          <input type="checkbox" name="keys" value={key} defaultChecked={chosen.includes(key)} className="size-[16px] accent-ink" />{printedNote(key)}
        </label>
      ))}
      <Button type="submit">Show these keys</Button>
    </form>
  );
}
