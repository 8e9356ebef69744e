import { StudentLadder } from '@/components/ladder/student-ladder';
import { Sheet } from '@/components/ui/sheet';
import type { StudentStanding } from '@/lib/ladder/server/student-standing';
import { HeardSoFar } from './heard-so-far';
import { PassedRungs } from './passed-rungs';
import { WhereTheyStand } from './where-they-stand';

/** The student on the ladder. Nothing at all for who may not read progress, or while the school has no ladder. */
export function Progress({ standing, locale }: { standing: StudentStanding | null; locale: string }) {
  if (!standing) return null;
  const { ladder, may, hearings, passed } = standing;
  const hrefOf = (rungId: string) => `/hearings/${ladder.student.id}?rung=${rungId}`;
  return (
    <>
      <WhereTheyStand standing={standing} locale={locale} />
      <Sheet title="The whole ladder"><StudentLadder ladder={ladder} locale={locale} {...(may.hear ? { hrefOf } : {})} /></Sheet>
      <HeardSoFar hearings={hearings} locale={locale} />
      <PassedRungs passed={passed} studentId={ladder.student.id} mayAskRecheck={may.askRecheck} locale={locale} />
    </>
  );
}
