import { clockOf } from '../time';

/** How far an enquiry has come, in the desk's words. */
export const ENQUIRY_WORDS = {
  new: 'new', answered: 'answered', slot_offered: 'opening held', trial_booked: 'trial booked', trial_taken: 'trial taken', deciding: 'deciding',
  waiting_list: 'waiting list', enrolled: 'enrolled', closed: 'closed',
} as const satisfies Record<string, string>;

export const OPEN_ENQUIRY_STATES = ['new', 'answered', 'slot_offered', 'trial_booked', 'trial_taken', 'deciding', 'waiting_list'] as const;

const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];

/** "Tue 15:30–18:30, Thu 16:00–17:30". */
export const wishWords = (wishes: readonly { weekday: number; fromMin: number; toMin: number }[]): string =>
  wishes.map(({ weekday, fromMin, toMin }) => `${DAYS[weekday - 1]} ${clockOf(fromMin)}–${toMin === 1440 ? '24:00' : clockOf(toMin)}`).join(', ');
