import type { TeacherCount } from '@/db/closures';
import { listOf } from '@/lib/format';

/** "Greta Holm (2) and Kwame Adu". */
export const lessonsByTeacher = (counts: readonly TeacherCount[], locale: string): string =>
  listOf(counts.map(({ teacherName, lessons }) => (lessons === 1 ? teacherName : `${teacherName} (${lessons})`)), locale);
