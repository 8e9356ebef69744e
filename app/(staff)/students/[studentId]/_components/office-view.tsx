import { Contacts } from './contacts';
import { Hand } from './hand';
import { Practice } from './practice-panel';
import { Progress } from './progress';
import { Credits, Enrolled } from './student-facts';
import { ComingLessons, PastLessons } from './student-lessons';
import type { ViewProps } from './teacher-view';

/** For desk and owner: lessons, whom to call and credits first, on a phone too; progress only for who may read it. */
export function OfficeView({ student, standing, practice, locale, today }: ViewProps) {
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
      <div className="contents lg:grid lg:min-w-0 lg:gap-4">
        <ComingLessons lessons={student.lessons} locale={locale} today={today} />
        <div className="order-last grid min-w-0 gap-4 lg:order-none">
          <PastLessons lessons={student.lessons} locale={locale} today={today} />
          <Progress standing={standing} locale={locale} />
        </div>
      </div>
      <div className="grid min-w-0 gap-4">
        <Contacts student={student} />
        <Credits student={student} locale={locale} />
        <Enrolled student={student} />
        <Practice practice={practice} lessons={student.lessons} locale={locale} today={today} />
        <Hand student={student} />
      </div>
    </div>
  );
}
