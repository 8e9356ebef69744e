import { WORK_WORDS, type PayRate } from './rates';

type Worded = Pick<PayRate, 'workType' | 'lengthMinutes' | 'seatsFrom' | 'seatsTo' | 'per'> & { lessonTypeLabel: string | null; siteName: string | null };

/** "Lesson, 45 min, a lesson", "Group, 4 to 6 seats, an hour": what a rate is for. */
export function rateWords({ workType, lessonTypeLabel, lengthMinutes, seatsFrom, seatsTo, siteName, per }: Worded): string {
  const seats = seatsFrom === null ? null : seatsTo === null ? `${seatsFrom} seats or more` : `${seatsFrom} to ${seatsTo} seats`;
  const isSame = lessonTypeLabel?.toLowerCase() === WORK_WORDS[workType].toLowerCase();
  const parts = [WORK_WORDS[workType], isSame ? null : lessonTypeLabel, lengthMinutes === null ? null : `${lengthMinutes} min`, seats, siteName, per === 'hour' ? 'by the hour' : null];
  return parts.filter((part) => part !== null).join(', ');
}
