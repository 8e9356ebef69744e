import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { practiceToday } from '@/lib/ladder/server/practice-today';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { PracticeRoom } from './_components/practice-room';

export const metadata = { title: 'Practice' };

export default async function PieceOfPracticePage({ params }: { params: Promise<{ kind: string; pieceId: string }> }) {
  const context = await requireContextTo('create', 'Practice');
  const { kind, pieceId } = await params;
  const today = await orNotFound(practiceToday({ studentId: context.actor.personId }, context));
  const piece = today?.pieces.find((one) => one.kind === kind && one.id === pieceId);
  // Reviewed meanwhile, replaced by a new set, or somebody else's: the list says what is there now.
  if (!today || !piece) notFound();
  return (
    <>
      <PageHeader title={piece.rung?.plainTitle ?? piece.text} sub={piece.rung ? `${piece.rung.code} ${piece.rung.title}` : undefined} actions={<>{piece.rung ? <ButtonLink href={`/sheets/${piece.rung.id}`} kind="quiet">Practice sheet</ButtonLink> : null}<ButtonLink href="/practice" kind="quiet">All of today</ButtonLink></>} />
      <PracticeRoom piece={piece} studentId={today.student.id} reachSemitones={today.student.reachSemitones} breakMinutes={today.breakMinutes} chordStyle={today.chordStyle} locale={context.school.locale} />
    </>
  );
}
