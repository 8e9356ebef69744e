/** Fifteen characters where the password is the only factor (NIST SP 800-63B-4); no rules about kinds of characters. */
export const SHORTEST_PASSWORD = 15;
export const LONGEST_PASSWORD = 128;

/** Words that say more about the place than about the person; a password may not be made of one of them and little else. */
const CONTEXT_WORDS = ['rungwell', 'password', 'keyboard', 'harmony', 'musicschool'];

/**
 * Why a password is not accepted, in words, or null. Counted in characters as a person counts them; nothing is
 * cut off. Repetition and simple runs are refused because they are the first guesses.
 */
export function passwordFault(password: string): string | null {
  const characters = [...password.normalize('NFKC')];
  if (characters.length < SHORTEST_PASSWORD) return `At least ${SHORTEST_PASSWORD} characters. Three or four words with spaces are easy to remember.`;
  if (characters.length > LONGEST_PASSWORD) return `At most ${LONGEST_PASSWORD} characters.`;
  if (new Set(characters).size < 5) return 'This repeats the same few characters; it would be guessed first.';
  const bare = password.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
  const left = CONTEXT_WORDS.reduce((text, word) => text.replaceAll(word, ''), bare);
  if (left.length < 6) return 'This is made of words that anybody would try here.';
  if (isRun(bare)) return 'This is a plain run of letters or digits; it would be guessed first.';
  return null;
}

const RUNS = ['abcdefghijklmnopqrstuvwxyz', '01234567890123456789', 'qwertyuiopasdfghjklzxcvbnm'];
const isRun = (text: string): boolean => text.length > 0 && RUNS.some((run) => run.repeat(3).includes(text));
