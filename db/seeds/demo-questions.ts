import { newId } from '@/lib/server/ids';
import { addDays } from '@/lib/time';
import { addEnquiryEvent, insertEnquiry } from '../enquiries';
import { transaction } from '../transaction';
import type { House } from './demo-types';

/** What waits for a person today: three enquiries in different states. */
const ENQUIRIES = [
  { contactName: 'Marta Adair', studentName: 'Wren Adair', studentAge: 9, state: 'new', hoursAgo: 3, message: 'Wren has played by ear for a year and would love chords.', weekdays: [2, 4], fromMin: 15 * 60 + 30 },
  { contactName: 'Iker Soto', studentName: 'Noa Soto', studentAge: 12, state: 'new', hoursAgo: 5, message: '', weekdays: [2, 3], fromMin: 16 * 60 },
  { contactName: 'Dara Finn', studentName: 'Dara Finn', studentAge: 34, state: 'answered', hoursAgo: 50, message: 'I played as a child. Evenings, please.', weekdays: [1, 3, 5], fromMin: 18 * 60 },
] as const;

export async function layOpenQuestions({ db, now, today, subjectId, siteIds }: House): Promise<void> {
  for (const [index, question] of ENQUIRIES.entries()) {
    const id = newId();
    const createdAt = now - question.hoursAgo * 3600;
    await transaction(db, async (trx) => {
      await insertEnquiry(trx, {
        id, contactName: question.contactName, contactEmail: `enquiry${index + 1}@family.example.com`, contactPhone: `0155 010 01${40 + index}`, studentName: question.studentName,
        studentAge: question.studentAge, isAdult: question.studentAge >= 18, subjectId, experience: '', levelGuess: 1, siteId: siteIds[0], lengthMinutes: 30,
        wishes: question.weekdays.map((weekday) => ({ weekday, fromMin: question.fromMin, toMin: question.fromMin + 180 })), source: 'web', message: question.message,
        state: question.state, nextStepOn: addDays(today, index === 2 ? 0 : 1), createdAt,
      });
      await addEnquiryEvent(trx, { id: newId(), enquiryId: id, at: createdAt, kind: 'received', text: 'Came in through the school’s own page.', byId: null });
    });
  }
}
