import Link from 'next/link';
import { LadderBars } from '@/components/ladder/ladder-bars';
import { Sheet } from '@/components/ui/sheet';
import type { StudentProgress } from '@/lib/ladder/server/progress-of-student';
import { currentLevel, type StudentLadder } from '@/lib/ladder/student-ladder';

/** The ladder in plain words, and where to read more. */
export function ProgressCard({ progress: { ladder, words, isReader } }: { progress: StudentProgress }) {
  return (
    <Sheet title={isReader ? 'Your ladder' : `${ladder.student.firstName} on the ladder`} action={<Link href={`/progress/${ladder.student.id}`} className="whitespace-nowrap font-semibold text-petrol no-underline hover:underline">Read more</Link>}>
      <LadderBars levels={nearLevels(ladder)} />
      <p className="mt-3">{words.now} {words.next}</p>
      {words.when ? <p className="mt-1 text-ink-2">{words.when}</p> : null}
    </Sheet>
  );
}

const SHOWN_LEVELS = 4;

/** The level before, the one the student is at, and what comes: four stairs fit a phone. */
function nearLevels(ladder: StudentLadder): StudentLadder['levels'] {
  const at = ladder.levels.findIndex(({ no }) => no === currentLevel(ladder)?.no);
  const first = Math.max(0, Math.min(at - 1, ladder.levels.length - SHOWN_LEVELS));
  return ladder.levels.slice(first, first + SHOWN_LEVELS);
}
