import { Check, Clock, Download, Music4, TriangleAlert } from 'lucide-react';
import { Button, ButtonLink, type ButtonKind } from '@/components/ui/button';
import { Chip, type ChipTone } from '@/components/ui/chip';
import { KeyHint } from '@/components/ui/key-hint';
import { Sheet } from '@/components/ui/sheet';

const KINDS: readonly { kind: ButtonKind; word: string }[] = [{ kind: 'primary', word: 'Book' }, { kind: 'brass', word: 'Pay now' }, { kind: 'plain', word: 'Week' }, { kind: 'quiet', word: 'Review' }, { kind: 'danger', word: 'Erase' }];
const CHIPS: readonly { tone: ChipTone; word: string; icon: React.ReactNode }[] = [
  { tone: 'ok', word: 'here', icon: <Check size={13} aria-hidden /> }, { tone: 'wait', word: 'waiting', icon: <Clock size={13} aria-hidden /> }, { tone: 'bad', word: '2 lessons unmarked', icon: <TriangleAlert size={13} aria-hidden /> },
  { tone: 'info', word: 'level 3', icon: null }, { tone: 'plum', word: 'recital', icon: <Music4 size={13} aria-hidden /> }, { tone: 'neutral', word: 'closed', icon: null },
];

export function ButtonsAndChips() {
  return (
    <Sheet title="Buttons and chips">
      <h3 className="eyebrow mb-2">Kinds</h3>
      <div className="flex flex-wrap gap-3">{KINDS.map(({ kind, word }) => <Button key={kind} kind={kind}>{word}</Button>)}</div>
      <h3 className="eyebrow mb-2 mt-4">At work, and not to be pressed</h3>
      <div className="flex flex-wrap gap-3">
        {KINDS.map(({ kind, word }) => <Button key={kind} kind={kind} pending>{word}</Button>)}
        <Button kind="primary" disabled>Close the month</Button>
      </div>
      <h3 className="eyebrow mb-2 mt-4">Links that look like buttons, with a picture</h3>
      <div className="flex flex-wrap items-center gap-3">
        <ButtonLink href="/today" kind="primary">Today</ButtonLink>
        <ButtonLink href="/components" icon={<Download size={16} aria-hidden />}>Export</ButtonLink>
        <ButtonLink href="/components" kind="quiet">Full report</ButtonLink>
        <span className="text-small text-ink-3">Find opens with <KeyHint keys="/" /></span>
      </div>
      <h3 className="eyebrow mb-2 mt-4">Chips: a word, and a colour that repeats it</h3>
      <div className="flex flex-wrap gap-2">{CHIPS.map(({ tone, word, icon }) => <Chip key={tone} tone={tone} icon={icon}>{word}</Chip>)}</div>
    </Sheet>
  );
}
