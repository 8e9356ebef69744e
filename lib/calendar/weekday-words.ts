import { clockOf } from '../time';

export const WEEKDAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;

/** "Tuesday 16:00, 45 min". */
export const weeklyWords = (weekday: number | null, startMin: number | null, lengthMinutes: number | null): string =>
  weekday === null || startMin === null ? '' : `${WEEKDAYS[weekday - 1]} ${clockOf(startMin)}${lengthMinutes ? `, ${lengthMinutes} min` : ''}`;
