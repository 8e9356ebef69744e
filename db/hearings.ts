import type { DrawnKey } from '@/lib/ladder/asks';
import type { KeyRecord } from '@/lib/ladder/draw';
import type { HearingState, HeardChord, Outcome } from '@/lib/ladder/hearing';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Hearing = {
  id: string; studentId: string; rungId: string; editionId: string; occurrenceId: string | null; termId: string | null; assessorId: string; assessorName: string;
  state: HearingState; seed: number | null; drawn: DrawnKey[]; outcome: Outcome | null; keysHeard: number | null; totalHundredths: number | null;
  passReason: string; notePublic: string; notePrivate: string; decidedAt: EpochSeconds | null; decidedOn: LocalDate | null; earliestAgainOn: LocalDate | null;
  startedOn: LocalDate; createdAt: EpochSeconds;
};
type Row = Omit<Hearing, 'drawn'> & { keysDrawnJson: string | null };

const toHearing = ({ keysDrawnJson, ...row }: Row): Hearing => ({ ...row, drawn: keysDrawnJson === null ? [] : (JSON.parse(keysDrawnJson) as DrawnKey[]) });

const rows = (db: Db) => db('hearing as h').join('person as p', 'p.id', 'h.assessorId').select<Row[]>(
  'h.id', 'h.studentId', 'h.rungId', 'h.editionId', 'h.occurrenceId', 'h.termId', 'h.assessorId', 'h.state', 'h.seed', 'h.keysDrawnJson', 'h.outcome', 'h.keysHeard',
  'h.totalHundredths', 'h.passReason', 'h.notePublic', 'h.notePrivate', 'h.decidedAt', 'h.decidedOn', 'h.earliestAgainOn', 'h.startedOn', 'h.createdAt',
  db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS assessor_name"));

export async function findHearing(db: Db, id: string): Promise<Hearing | undefined> {
  const row = await rows(db).where('h.id', id).first();
  return row && toHearing(row);
}

/** A decision that was taken back stays in the table and counts for nothing: another hearing follows it. */
const COUNTS = 'NOT EXISTS (SELECT 1 FROM hearing n WHERE n.replaces_id = h.id)';

const UNDER_WAY: HearingState[] = ['planned', 'keys_drawn', 'played'];

export async function hearingUnderWay(db: Db, studentId: string, rungId: string): Promise<Hearing | undefined> {
  const row = await rows(db).where({ 'h.studentId': studentId, 'h.rungId': rungId }).whereIn('h.state', UNDER_WAY).first();
  return row && toHearing(row);
}

/** All hearings of a student, newest first; those stopped or taken back count for nothing and are left out. */
export const hearingsOf = async (db: Db, studentId: string): Promise<Hearing[]> =>
  (await rows(db).where('h.studentId', studentId).whereNot('h.state', 'stopped').whereRaw(COUNTS).orderBy('h.createdAt', 'desc')).map(toHearing);

type NewHearing = Pick<Hearing, 'id' | 'studentId' | 'rungId' | 'editionId' | 'occurrenceId' | 'termId' | 'assessorId' | 'startedOn' | 'createdAt'> & { seed: number; drawn: DrawnKey[]; replacesId?: string };
export async function insertHearing(trx: Trx, { drawn, ...hearing }: NewHearing): Promise<void> {
  await trx('hearing').insert({ ...hearing, state: 'keys_drawn', keysDrawnJson: JSON.stringify(drawn) });
}

type Decision = Pick<Hearing, 'outcome' | 'keysHeard' | 'totalHundredths' | 'passReason' | 'notePublic' | 'notePrivate' | 'decidedAt' | 'decidedOn' | 'earliestAgainOn'>;
export async function decide(trx: Trx, id: string, decision: Decision): Promise<void> {
  await trx('hearing').where({ id }).update({ ...decision, state: 'decided' });
}
export async function markPlayed(trx: Trx, id: string): Promise<void> {
  await trx('hearing').where({ id }).update({ state: 'played' });
}
export async function stop(trx: Trx, id: string, reason: string): Promise<void> {
  await trx('hearing').where({ id }).update({ state: 'stopped', stoppedReason: reason });
}
export async function insertScores(trx: Trx, scores: { id: string; hearingId: string; criterion: string; weightPercent: number; score: number }[]): Promise<void> {
  if (scores.length > 0) await trx('hearing_score').insert(scores);
}

export type Proof = { id: string; hearingId: string; drawnNo: number; tryNo: number; heard: HeardChord[]; isHeard: boolean; source: 'midi' | 'screen' | 'ear'; judgeVersion: number; at: EpochSeconds };
type ProofRow = Omit<Proof, 'heard' | 'isHeard'> & { heardJson: string; isHeard: number };
const toProof = ({ heardJson, isHeard, ...row }: ProofRow): Proof => ({ ...row, heard: JSON.parse(heardJson) as HeardChord[], isHeard: isHeard === 1 });

export async function insertProof(trx: Trx, { heard, isHeard, ...proof }: Proof): Promise<void> {
  await trx('proof').insert({ ...proof, heardJson: JSON.stringify(heard), isHeard: isHeard ? 1 : 0 });
}

/** In the order they were played; of a key tried more than once the last one counts. */
export const proofsOf = async (db: Db, hearingId: string): Promise<Proof[]> =>
  (await db<ProofRow>('proof').where({ hearingId }).orderBy(['drawnNo', 'tryNo']).select<ProofRow[]>('id', 'hearingId', 'drawnNo', 'tryNo', 'heardJson', 'isHeard', 'source', 'judgeVersion', 'at')).map(toProof);

export const lastTries = (proofs: readonly Proof[]): Map<number, Proof> => new Map(proofs.map((proof) => [proof.drawnNo, proof]));
/** Keys that count by the teacher's ear alone. */
export const countByEar = (proofs: readonly Proof[]): number => [...lastTries(proofs).values()].filter(({ isHeard, source }) => isHeard && source === 'ear').length;
export const countHeard = (proofs: readonly Proof[]): number => [...lastTries(proofs).values()].filter(({ isHeard }) => isHeard).length;

/** Of each of these hearings the places of the drawn keys that were heard; of several tries the last one counts. */
export async function keysHeardIn(db: Db, hearingIds: readonly string[]): Promise<Map<string, Set<number>>> {
  const tries: { hearingId: string; drawnNo: number; isHeard: number }[] = await db('proof').whereIn('hearingId', [...hearingIds]).orderBy('tryNo').select('hearingId', 'drawnNo', 'isHeard');
  const heard = new Map<string, Set<number>>(hearingIds.map((id) => [id, new Set<number>()]));
  for (const { hearingId, drawnNo, isHeard } of tries) {
    if (isHeard === 1) heard.get(hearingId)?.add(drawnNo);
    else heard.get(hearingId)?.delete(drawnNo);
  }
  return heard;
}

/** How each key went at this rung before, for the weight of the next draw. */
export async function keyRecords(db: Db, studentId: string, rungId: string): Promise<KeyRecord[]> {
  const proofs = await db('proof as f').join('hearing as h', 'h.id', 'f.hearingId').where({ 'h.studentId': studentId, 'h.rungId': rungId }).whereRaw(COUNTS)
    .select<{ drawnNo: number; isHeard: number; keysDrawnJson: string }[]>('f.drawnNo', 'f.isHeard', 'h.keysDrawnJson');
  const records = new Map<string, KeyRecord>();
  for (const { drawnNo, isHeard, keysDrawnJson } of proofs) {
    const key = (JSON.parse(keysDrawnJson) as DrawnKey[])[drawnNo]?.key;
    if (key === undefined) continue;
    const before = records.get(key) ?? { key, asked: 0, wrong: 0 };
    records.set(key, { key, asked: before.asked + 1, wrong: before.wrong + (isHeard === 1 ? 0 : 1) });
  }
  return [...records.values()];
}

export async function countAttempts(db: Db, studentId: string, rungId: string, term: { startsOn: LocalDate; endsOn: LocalDate }): Promise<number> {
  const [row] = await db('hearing as h').where({ studentId, rungId, state: 'decided' }).whereRaw(COUNTS)
    .whereBetween('decidedOn', [term.startsOn, term.endsOn]).count<{ count: number }[]>('* as count');
  return row?.count ?? 0;
}

export async function lastNotYetOn(db: Db, studentId: string, rungId: string): Promise<LocalDate | null> {
  const row = await db('hearing as h').where({ studentId, rungId, state: 'decided' }).whereRaw(COUNTS).orderBy('decidedAt', 'desc')
    .first<{ decidedOn: LocalDate; outcome: Outcome } | undefined>('decidedOn', 'outcome');
  return row?.outcome === 'not_yet' ? row.decidedOn : null;
}
