import type { EpochSeconds } from '../time';

/**
 * How long the one who decided a hearing may take the decision back: enough for a wrong button or a wrong student to
 * be noticed, short enough that nobody acts on it meanwhile. The mail of a pass waits exactly as long.
 */
const UNDO_SECONDS = 600;

/** The moment from which a decision stays; it may be taken back before it, not at it. */
export const staysFrom = (decidedAt: EpochSeconds): EpochSeconds => decidedAt + UNDO_SECONDS;

/** Seconds in which it may still be taken back; 0 when it stays. */
export const undoSecondsLeft = (decidedAt: EpochSeconds, now: EpochSeconds): number => Math.max(0, staysFrom(decidedAt) - now);

/** "9 min left"; under a minute the seconds are not counted aloud. */
export const undoLeftWords = (secondsLeft: number): string => (secondsLeft >= 60 ? `${Math.floor(secondsLeft / 60)} min left` : 'less than a minute left');
