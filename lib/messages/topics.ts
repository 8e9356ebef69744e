/**
 * What the school writes about. Topics marked "always" cannot be switched off: closure today, no-show of a
 * minor, invoices, a failed payment and security (job map B19).
 */
export const TOPICS = {
  invitation: { label: 'Invitation', always: true },
  password: { label: 'Password and security', always: true },
  enquiry: { label: 'Your enquiry', always: true },
  trial: { label: 'Trial lesson', always: true },
  enrolment: { label: 'Enrolment', always: true },
  schedule_change: { label: 'Changes of lessons', always: false },
  absence: { label: 'Absences', always: false },
  no_show: { label: 'A child did not arrive', always: true },
  invoice: { label: 'Invoices', always: true },
  receipt: { label: 'Receipts', always: false },
  payment_failed: { label: 'A payment failed', always: true },
  rung_passed: { label: 'A rung was passed', always: false },
  practice: { label: 'Practice of a student', always: false },
  practice_hurt: { label: 'A student said that playing hurts', always: true },
  report: { label: 'Progress reports', always: false },
  pay_check: { label: 'Check of pay', always: true },
  cover_offer: { label: 'Offers to cover', always: true },
  recital: { label: 'Recitals', always: false },
} as const satisfies Record<string, { label: string; always: boolean }>;

export type Topic = keyof typeof TOPICS;
