import { formatDate } from '../format';
import type { LocalDate } from '../time';
import type { Projection } from './projection';

export type PlainRung = { plainTitle: string; canDo: string; soundsLike: string };

export type ProgressFacts = {
  /** As the reader says it: a first name, or "you". */
  name: string;
  isReader: boolean;
  passed: readonly (PlainRung & { on: LocalDate; /** in doubt: counted as passed, not told as the latest thing one can do */ isToRecheck?: boolean })[];
  rungCount: number;
  next: PlainRung | null;
  projection: Projection | null;
  today: LocalDate;
  locale: string;
};

export type ProgressWords = { now: string; sound: string | null; next: string; when: string | null; count: string };

/** "the full major ninth chord": the short name inside a sentence. */
const inSentence = (plainTitle: string): string => plainTitle.charAt(0).toLowerCase() + plainTitle.slice(1);

/** How far a student is, in words that need no music theory. Dates come only from the student's own pace. */
export function progressWords({ name, isReader, passed, rungCount, next, projection, today, locale }: ProgressFacts): ProgressWords {
  const who = isReader ? 'You' : name;
  const latest = [...passed].sort((a, b) => Number(b.isToRecheck ?? false) - Number(a.isToRecheck ?? false) || a.on.localeCompare(b.on)).at(-1);
  const have = isReader ? 'have' : 'has';
  return {
    now: latest ? `${who} can now ${latest.canDo}.` : `${who} ${have} begun. The first rung is being prepared.`,
    sound: latest ? `What it sounds like: ${latest.soundsLike.charAt(0).toLowerCase()}${latest.soundsLike.slice(1)}` : null,
    next: next ? `Next: ${inSentence(next.plainTitle)}. Then ${isReader ? 'you' : name} can ${next.canDo}.` : `${who} ${have} climbed the whole ladder.`,
    when: next && projection ? whenSentence(projection, today, locale) : null,
    count: passed.length === 0 ? `${rungCount} rungs lie ahead; each is one thing to be able to play.` : `${passed.length} of ${rungCount} rungs passed.`,
  };
}

function whenSentence({ soonestOn, likelyOn, latestOn }: Projection, today: LocalDate, locale: string): string | null {
  if (latestOn < today) return null;
  const day = (date: LocalDate) => formatDate(date < today ? today : date, locale);
  const [soonest, likely, latest] = [day(soonestOn), day(likelyOn), day(latestOn)];
  return soonest === latest ? `At this pace it should follow around ${likely}.` : `At this pace it should follow around ${likely}, somewhere between ${soonest} and ${latest}.`;
}
