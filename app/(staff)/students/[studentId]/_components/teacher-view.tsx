import type { StaffPractice } from '@/lib/ladder/server/practice-for-staff';
import type { StudentStanding } from '@/lib/ladder/server/student-standing';
import type { StudentScreen } from '@/lib/people/server/read-students';
import type { LocalDate } from '@/lib/time';
import { Enrolled } from './student-facts';
import { Hand } from './hand';
import { ComingLessons, NextLesson, PastLessons } from './student-lessons';
import { Practice } from './practice-panel';
import { Progress } from './progress';

export type ViewProps = { student: StudentScreen; standing: StudentStanding | null; practice: StaffPractice | null; locale: string; today: LocalDate };

/** At the piano: when the next lesson is, where the student stands, what comes next; then hands and lessons. */
export function TeacherView({ student, standing, practice, locale, today }: ViewProps) {
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
      <div className="grid min-w-0 gap-4">
        <NextLesson lessons={student.lessons} locale={locale} today={today} />
        <Progress standing={standing} locale={locale} />
      </div>
      <div className="grid min-w-0 gap-4">
        <Practice practice={practice} lessons={student.lessons} locale={locale} today={today} />
        <Hand student={student} />
        <Enrolled student={student} />
        <ComingLessons lessons={student.lessons} locale={locale} today={today} />
        <PastLessons lessons={student.lessons} locale={locale} today={today} />
      </div>
    </div>
  );
}
