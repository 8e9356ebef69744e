/** What reading one cell came to: a value, or what is wrong with it in words that follow "the row was left out because …". */
export type Reading<T> = { value: T } | { fault: string };

export const read = <T>(value: T): Reading<T> => ({ value });
export const faulty = <T>(fault: string): Reading<T> => ({ fault });
