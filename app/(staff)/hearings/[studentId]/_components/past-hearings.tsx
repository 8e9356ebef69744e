import { Check, Clock } from 'lucide-react';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import { OUTCOME_WORDS } from '@/lib/ladder/hearing';
import type { PastHearing } from '@/lib/ladder/server/hearing-screen';

/** What was decided on this rung before; nothing here can be changed. */
export function PastHearings({ past, locale }: { past: readonly PastHearing[]; locale: string }) {
  if (past.length === 0) return null;
  return (
    <Sheet eyebrow="Heard before">
      <ol className="grid gap-3">
        {past.map(({ id, outcome, on, by, keysHeard, notePublic, notePrivate }) => (
          <li key={id} className="text-small">
            <p className="flex flex-wrap items-center gap-2">
              <Chip tone={outcome === 'passed' ? 'ok' : 'wait'} icon={outcome === 'passed' ? <Check size={13} aria-hidden /> : <Clock size={13} aria-hidden />}>{OUTCOME_WORDS[outcome]}</Chip>
              <span className="text-ink-3">{`${formatDate(on, locale)}, ${by}, ${keysHeard} keys`}</span>
            </p>
            {notePublic ? <p className="mt-1">{notePublic}</p> : null}
            {notePrivate ? <p className="mt-1 text-ink-3">{`Staff: ${notePrivate}`}</p> : null}
          </li>
        ))}
      </ol>
    </Sheet>
  );
}
