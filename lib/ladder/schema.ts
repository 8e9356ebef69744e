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

export const undoHearingSchema = z.object({ hearingId: id });

export const askRecheckSchema = z.object({ studentId: id, rungId: id, reason: words(500).min(3, 'Say why in a few words.') });

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

const plainWords = (most: number) => words(most).min(3, 'Guardians read this: write a few plain words.');
const noteName = z.string().regex(/^[A-G](b|#)?$/, 'Keys are named C, Db, F# and so on.');

/** A rung of the edition being prepared, as the editor sends it. `turns` is the written form of what is asked. */
export const rungDraftSchema = z.object({
  title: words(80).min(3, 'Give it a title.'), plainTitle: plainWords(80), canDo: plainWords(200), soundsLike: plainWords(200),
  how: z.enum(['voicing', 'free', 'spell', 'name_tensions']),
  turns: z.string().max(4000, 'At most 4000 signs.'),
  seconds: z.number().positive('More than none.').max(600).nullable(),
  beatsPerMinute: z.number().int().min(20, 'At least 20.').max(300, 'At most 300.').nullable(),
  beatsPerChord: z.number().int().min(1).max(16).nullable(),
  slipsPerTurn: z.number().int().min(0).max(10), isShuffled: z.boolean(), listenFor: words(200).min(3, 'Say what the teacher listens for.'),
  keyPool: z.array(noteName).min(1, 'Choose at least one key.').max(15),
  keysDrawn: z.number().int().min(1).max(60), keysNeeded: z.number().int().min(1).max(60),
  must: z.array(id).max(10), should: z.array(id).max(10),
});

export const changeRungSchema = rungDraftSchema.extend({ rungId: id, rule: z.enum(['same', 'kept', 're_check']) });
export const addRungSchema = z.object({
  code: z.string().trim().regex(/^[0-9]{1,2}\.[0-9]{1,2}[a-z]?$/, 'A code such as 4.3 or 4.3a.'),
  afterRungId: id,
  /** The rung it was split from: those who have that one are credited this one. Empty for one that is wholly new. */
  fromRungId: id.or(z.literal('')),
});
export const leaveOutRungSchema = z.object({ rungId: id, /** those who have it are credited this one */ intoRungId: id });
export const startEditionSchema = z.object({ label: words(40).min(3, 'Name the edition, for example “Second edition”.') });
export const publishEditionSchema = z.object({ /** what the rehearsal showed, so that nothing else is published than what was looked at */ climbers: z.number().int().min(0) });
