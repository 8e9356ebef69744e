import * as z from 'zod';

const id = z.string().min(1).max(80);
const words = (most: number) => z.string().trim().max(most, `At most ${most} signs.`);

export const startHearingSchema = z.object({
  studentId: id,
  rungId: id,
  occurrenceId: id.optional(),
  /** The lead's own words when a need, the waiting days or the limit of attempts is set aside. */
  leadReason: words(500).default(''),
});

export const agreeHearingSchema = z.object({ studentId: id, rungId: id, reason: words(500).min(3, 'Say why in a few words.') });

/** One chord as it came in: which keys, how long after the question, or the teacher's word for a spoken answer. */
const heardChordSchema = z.object({
  played: z.array(z.number().int()).max(24, 'Too many keys at once.').default([]),
  milliseconds: z.number().int().min(0).max(3_600_000).nullable().default(null),
  byEar: z.enum(['right', 'not_right']).nullable().default(null),
});

export const recordProofSchema = z.object({
  hearingId: id,
  drawnNo: z.number().int().min(0).max(200),
  source: z.enum(['midi', 'screen', 'ear']),
  heard: z.array(heardChordSchema).min(1).max(24),
});

export const decideHearingSchema = z.object({
  hearingId: id,
  outcome: z.enum(['passed', 'not_yet']),
  passReason: words(500).default(''),
  notePublic: words(1000).default(''),
  notePrivate: words(1000).default(''),
  marks: z.array(z.object({ criterion: z.string().trim().min(1).max(60), weightPercent: z.number().int().min(1).max(100), score: z.number().int().min(0).max(4) })).max(8).default([]),
});

export const stopHearingSchema = z.object({ hearingId: id, reason: words(300).min(3, 'Say why in a few words.') });

const playedKeySchema = z.object({
  chords: z.array(z.object({ played: z.array(z.number().int()).max(24, 'Too many keys at once.').default([]), byEar: z.enum(['right', 'not_right']).nullable().default(null) })).max(24),
});
const practiceMinutes = z.number('Say for how many minutes.').int().min(1, 'At least one minute.').max(300, 'At most 300 minutes at a time.');

/** What was practised just now. Of a review the keys come with it; anything else only tells the minutes. */
export const finishPracticeSchema = z.object({
  studentId: id,
  kind: z.enum(['set', 'review', 'ahead']),
  itemId: id,
  minutes: practiceMinutes,
  how: z.enum(['timed', 'told']).default('timed'),
  feeling: z.enum(['easy', 'fine', 'hard']).nullable().default(null),
  note: words(500).default(''),
  played: z.array(playedKeySchema).max(60).default([]),
});

export const itHurtsSchema = z.object({ studentId: id, minutes: practiceMinutes, where: words(200).default('') });

const practiceItemSchema = z.object({
  rungId: id.or(z.literal('')).default(''),
  piece: words(120).default(''),
  keys: z.array(z.string().regex(/^[A-G](b|#)?$/, 'Keys are named C, Db, F# and so on.')).max(12).default([]),
  beatsPerMinute: z.number().int().min(20, 'At least 20 beats a minute.').max(300, 'At most 300 beats a minute.').nullable().default(null),
  minutes: z.number().int().min(1).max(120, 'At most 120 minutes a day.').nullable().default(null),
  howRight: words(300).default(''),
}).refine(({ rungId, piece }) => rungId !== '' || piece !== '', { message: 'Choose a rung, or write what to practise.', path: ['piece'] });

export const setPracticeSchema = z.object({
  studentId: id,
  dueOn: z.iso.date('Choose the day until which it is set.'),
  items: z.array(practiceItemSchema).min(1, 'Set at least one thing.').max(8, 'Eight things are enough.'),
});
