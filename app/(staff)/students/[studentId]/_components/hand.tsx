import { Sheet } from '@/components/ui/sheet';
import { HOW_REACH_IS_MEASURED, reachWords } from '@/lib/harmony/reach';
import type { StudentScreen } from '@/lib/people/server/read-students';
import { ReachForm } from './reach-form';

/** How far one hand reaches; whoever teaches the student measures it. */
export function Hand({ student: { id, reach } }: { student: StudentScreen }) {
  if (!reach) return null;
  return (
    <Sheet eyebrow="Hand">
      <p className="font-semibold">{`Reaches ${reachWords(reach.semitones)}`}</p>
      <p className="mt-1 text-small text-ink-3">Wider voicings are shared between the hands, thinned or rolled; rolled counts.</p>
      {reach.mayChange ? <><ReachForm key={reach.semitones} studentId={id} semitones={reach.semitones} /><p className="mt-2 text-small text-ink-3">{HOW_REACH_IS_MEASURED}</p></> : null}
    </Sheet>
  );
}
