/** How the tables that an import writes are called by people. */
export const MADE_WORDS: Record<string, string> = {
  term: 'the term', person: 'the person', contact_point: 'the address or phone', engagement: 'the engagement', qualification: 'what they may teach', availability: 'the days',
  pay_rate: 'the rate', subject: 'the subject', feature: 'the equipment', room: 'the room', family: 'the family', payer: 'the payer', split_rule: 'the shares', relationship: 'the guardian',
  consent: 'the photo answer', student_ladder: 'the place on the ladder', rung_credit: 'the level', series: 'the weekly lesson', enrolment: 'the enrolment', occurrence: 'a lesson', seat: 'the attendance of a lesson',
};

const USE_WORDS: Record<string, string> = {
  user_account: 'has an account', occurrence: 'has a lesson', seat: 'sits in a lesson', series: 'has a weekly lesson', enrolment: 'has an enrolment', invoice: 'has an invoice', invoice_line: 'stands on an invoice',
  payment: 'has a payment', hearing: 'has a hearing', lesson_note: 'has a lesson note', practice_set: 'has practice set', practice_log: 'has practice noted', pay_line: 'is paid for', time_entry: 'has hours entered',
  health_note: 'has a health note', consent: 'has an answer given', thread: 'is written about', thread_member: 'takes part in messages', outbox: 'was sent mail', make_up_credit: 'has a make-up credit',
  family_student: 'belongs to a family', relationship: 'is a guardian or a child of someone', staff_document: 'has a document', opening_offer: 'has an opening held', term_report: 'has a report',
};

/** What somebody did with a row since. */
export const useWord = (table: string): string => USE_WORDS[table] ?? `is used in ${table.replaceAll('_', ' ')}`;
