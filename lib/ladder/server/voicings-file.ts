import 'server-only';
import { AppError } from '@/lib/errors';
import { download } from '@/lib/exports/server/download';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { scoreContent, type ScoreKind } from '../score-file';
import { findVoicings, scoreOfFinder, type VoicingQuery } from '../voicing-finder';

/** The smoothest way as MusicXML or MIDI; worked out again from the question, so that the file is what the screen shows. */
export async function voicingsFile({ as, ...query }: VoicingQuery & { as: ScoreKind }, { ability, school }: Context): Promise<Response> {
  assertCan(ability, 'read', 'Ladder', {});
  const result = findVoicings(query, school.chordStyle);
  if (result.kind === 'refused') throw new AppError('invalid', result.message);
  return download(scoreContent(scoreOfFinder(query, result.voicings), as), 'voicings', as);
}
