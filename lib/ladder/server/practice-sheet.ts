import 'server-only';
import { editionOfStudent, findRung, liveEdition } from '@/db/ladders';
import { AppError, notFound } from '@/lib/errors';
import { download } from '@/lib/exports/server/download';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { NoteName } from '@/lib/harmony/note';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { askDegrees, askName, asksOf, drawnLabel, type Ask } from '../asks';
import { isSpoken, type Criteria } from '../play-spec';
import { scoreContent, type ScoreKind } from '../score-file';

export type SheetRow = { label: string; asks: Ask[]; chords: { name: string; notes: NoteName[] }[]; degrees: string[] };
export type PracticeSheet = {
  rung: { id: string; code: string; title: string; plainTitle: string; canDo: string; soundsLike: string; criteria: Criteria; keyPool: string[]; isPlayed: boolean };
  keys: string[]; rows: SheetRow[]; schoolName: string; chordStyle: ChordStyle;
};
type Asked = { rungId: string; keys: readonly string[] };

const FIRST_KEYS = 3;

/**
 * One rung to practise in any of its keys: notation, keys and degrees. Of the edition a student climbs, else of the
 * live one; without named keys the first few of the rung’s pool.
 */
export async function practiceSheet({ rungId, keys }: Asked, { db, ability, actor, school }: Context): Promise<PracticeSheet> {
  assertCan(ability, 'read', 'Ladder', {});
  const edition = actor.role === 'student' ? await editionOfStudent(db, actor.personId) : await liveEdition(db);
  const rung = edition && (await findRung(db, edition.id, rungId));
  if (!rung) throw notFound('rung');
  const wanted = rung.keyPool.filter((key) => keys.includes(key));
  const shown = wanted.length > 0 ? wanted : rung.keyPool.slice(0, FIRST_KEYS);
  const { id, code, title, plainTitle, canDo, soundsLike, criteria, keyPool, spec } = rung;
  const rows = shown.flatMap((key) => spec.turns.map((_turn, turn): SheetRow => {
    const asks = asksOf(spec, { key, turn });
    return {
      label: drawnLabel(spec, { key, turn }, school.chordStyle), asks, degrees: asks.map((ask) => askDegrees(ask) || (ask.answer ?? '')),
      chords: asks.map((ask) => ({ name: askName(ask, school.chordStyle), notes: ask.shown.notes.map(({ note }) => note) })),
    };
  }));
  return { rung: { id, code, title, plainTitle, canDo, soundsLike, criteria, keyPool, isPlayed: !isSpoken(spec.how) && spec.how !== 'free' }, keys: shown, rows, schoolName: school.name, chordStyle: school.chordStyle };
}

const PLAIN_BEATS_PER_MINUTE = 60;

/** The sheet as a file: a chord a bar, in the rung’s tempo. */
export async function practiceSheetFile({ as, ...asked }: Asked & { as: ScoreKind }, context: Context): Promise<Response> {
  const { rung, rows, keys } = await practiceSheet(asked, context);
  if (!rung.isPlayed) throw new AppError('invalid', 'This rung has no one voicing to write down.');
  const bars = rows.flatMap(({ asks, chords }) => asks.map((ask, at) => ({ chord: ask.shown.chord, notes: chords[at]?.notes ?? [] })));
  const { tempo } = rung.criteria;
  const score = { title: `${rung.code} ${rung.title}`, tonic: keys.length === 1 ? (keys[0] ?? 'C') : 'C', beatsPerMinute: tempo?.beatsPerMinute ?? PLAIN_BEATS_PER_MINUTE, beatsPerBar: tempo && tempo.beatsPerChord <= 4 ? tempo.beatsPerChord : 4, bars };
  return download(scoreContent(score, as), `${rung.code} ${rung.title}`, as);
}
