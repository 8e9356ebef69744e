import { Check, Clock } from 'lucide-react';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import { OUTCOME_WORDS } from '@/lib/ladder/hearing';
import type { HeardRung } from '@/lib/ladder/server/student-standing';

/** Every decided hearing, the latest first: outcome, keys, and the notes the reader may see. */
export function HeardSoFar({ hearings, locale }: { hearings: readonly HeardRung[]; locale: string }) {
  return (
    <Sheet title="Hearings" flush>
      {hearings.length === 0 ? <p className="px-4 pb-4 text-ink-3">No rung has been heard yet.</p> : (
        <ul>
          {hearings.map(({ id, code, title, outcome, on, by, keysHeard, keysMissed, notePublic, notePrivate }) => (
            <li key={id} className="grid gap-1 border-t border-rule px-4 py-3">
              <p className="flex flex-wrap items-center justify-between gap-2">
                <span className="font-bold"><span className="num mr-2 text-ink-3">{code}</span>{title}</span>
                <Chip tone={outcome === 'passed' ? 'ok' : 'wait'} icon={outcome === 'passed' ? <Check size={13} aria-hidden /> : <Clock size={13} aria-hidden />}>{OUTCOME_WORDS[outcome]}</Chip>
              </p>
              <p className="text-small text-ink-3">{`${formatDate(on, locale, 'short')}, heard by ${by}`}</p>
              <p className="text-small text-ink-2">{keysLine(keysHeard, keysMissed)}</p>
              {notePublic ? <p className="max-w-[60ch]">{`“${notePublic}”`}</p> : null}
              {notePrivate ? <p className="max-w-[60ch] text-small text-ink-2"><b>For staff:</b> {notePrivate}</p> : null}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function keysLine(heard: readonly string[], missed: readonly string[]): string {
  if (heard.length === 0) return `No key heard of ${missed.length} asked.`;
  return missed.length === 0 ? `Heard: ${heard.join(', ')}.` : `Heard: ${heard.join(', ')}. Not heard: ${missed.join(', ')}.`;
}
