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
