import { BookOpen, RotateCcw, Telescope, type LucideIcon } from 'lucide-react';
import Link from 'next/link';
import { buttonClass } from '@/components/ui/button';
import { Chip, type ChipTone } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { formatDate } from '@/lib/format';
import { drawnLabel } from '@/lib/ladder/asks';
import type { PracticeKind } from '@/lib/ladder/practice';
import type { PracticePiece, PracticeToday } from '@/lib/ladder/server/practice-today';

const TONES: Record<PracticeKind, ChipTone> = { set: 'wait', review: 'info', ahead: 'neutral' };
const KINDS: Record<PracticeKind, { words: string; icon: LucideIcon }> = {
  set: { words: 'from your lesson', icon: BookOpen }, review: { words: 'comes back', icon: RotateCcw }, ahead: { words: 'to try ahead', icon: Telescope },
};

/** Today's list: what the teacher set first, then what comes back, then what may be tried. */
export function PieceList({ today: { pieces, setBy, dueOn, chordStyle }, locale }: { today: PracticeToday; locale: string }) {
  if (pieces.length === 0) return <Sheet><EmptyState title="Nothing is waiting">Play what you like. Rungs you have passed come back here by and by.</EmptyState></Sheet>;
  return (
    <Sheet eyebrow={setBy && dueOn ? `${setBy} set this until ${formatDate(dueOn, locale, 'short')}` : 'Today'} flush>
      <ul>
        {pieces.map((piece) => <PieceRow key={`${piece.kind} ${piece.id}`} piece={piece} keys={keyWords(piece, chordStyle)} />)}
      </ul>
    </Sheet>
  );
}

const keyWords = ({ rung }: PracticePiece, chordStyle: PracticeToday['chordStyle']): string =>
  rung ? [...new Set(rung.keys.map((one) => drawnLabel(rung.spec, one, chordStyle)))].join(' ') : '';

function PieceRow({ piece, keys }: { piece: PracticePiece; keys: string }) {
  const { kind, id, rung, text } = piece;
  const { words, icon: Icon } = KINDS[kind];
  const name = rung?.plainTitle ?? text;
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-rule px-4 py-4">
      <div className="min-w-0 flex-1 basis-56">
        <p className="font-display text-h2">{name}</p>
        {rung ? <p className="text-small text-ink-3">{`${rung.code} ${rung.title}`}</p> : null}
        <PieceFacts piece={piece} keys={keys} />
        <p className="mt-2"><Chip tone={TONES[kind]} icon={<Icon size={13} aria-hidden />}>{words}</Chip></p>
      </div>
      <Link href={`/practice/${kind}/${id}`} className={buttonClass(kind === 'ahead' ? 'plain' : 'primary', 'max-md:w-full')} aria-label={`Practise ${name}`}>Practise</Link>
    </li>
  );
}

function PieceFacts({ piece: { rung, text, beatsPerMinute, minutes, howRight }, keys }: { piece: PracticePiece; keys: string }) {
  const facts = [keys, beatsPerMinute ? `${beatsPerMinute} beats a minute` : '', minutes ? `${minutes} min a day` : ''].filter((fact) => fact !== '');
  const lines = [rung ? text : '', facts.join(' · '), howRight].filter((line) => line !== '');
  return lines.map((line) => <p key={line} className="num mt-1 text-ink-2">{line}</p>);
}
