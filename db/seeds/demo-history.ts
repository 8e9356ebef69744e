import type { House } from './demo-house';
import type { demoTerms } from './demo-calendar-plan';

/** Bills, pay and the ladder of the past months. */
export async function layHistory(_house: House, _terms: ReturnType<typeof demoTerms>): Promise<void> {}
