import type { LocalDate } from '@/lib/time';
import type { Db } from './connection';

export type StaffPaper = { personId: string; name: string; kind: 'employee' | 'contractor'; highestLevel: number | null; checkIssuedOn: LocalDate | null; checkExpiresOn: LocalDate | null };

/** Teachers with their newest background check and the highest level they are qualified for. */
export const staffPapers = (db: Db): Promise<StaffPaper[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').whereNull('e.endsOn').groupBy('p.id').orderBy('name')
    .select<StaffPaper[]>('p.id as personId', 'e.kind', db.raw("trim(p.given_name || ' ' || p.family_name) AS name"),
      db.raw('(SELECT max(q.level_to) FROM qualification q WHERE q.person_id = p.id AND q.ends_on IS NULL) AS highest_level'),
      db.raw("(SELECT d.issued_on FROM staff_document d WHERE d.person_id = p.id AND d.kind = 'background_check' ORDER BY d.issued_on DESC LIMIT 1) AS check_issued_on"),
      db.raw("(SELECT d.expires_on FROM staff_document d WHERE d.person_id = p.id AND d.kind = 'background_check' ORDER BY d.issued_on DESC LIMIT 1) AS check_expires_on"));
