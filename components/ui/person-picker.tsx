'use client';

import { X } from 'lucide-react';
import { useId, useState, type KeyboardEvent, type ReactNode } from 'react';
import type { PickedKind, PickedPerson } from '@/lib/people/found';
import { usePeople } from '../queries/use-people';
import { Field, INPUT, type FieldIds } from './field';

type PersonPickerProps = { label: ReactNode; kind: PickedKind; value: PickedPerson | null; onPick: (person: PickedPerson | null) => void; help?: ReactNode; error?: string; optional?: boolean };

/** A field that finds a person by typing part of the name (the combobox of the WAI-ARIA practices): arrows move, Enter picks, Escape closes. */
export function PersonPicker({ label, kind, value, onPick, help, error, optional }: PersonPickerProps) {
  return (
    <Field label={label} help={help} error={error} optional={optional}>
      {(ids) => (value === null ? <Search ids={ids} kind={kind} onPick={onPick} /> : <Picked ids={ids} person={value} onClear={() => onPick(null)} />)}
    </Field>
  );
}

function Picked({ ids, person, onClear }: { ids: FieldIds; person: PickedPerson; onClear: () => void }) {
  return (
    <span className="relative block">
      <input {...ids} readOnly value={person.name} onKeyDown={(event) => (event.key === 'Backspace' || event.key === 'Delete') && onClear()} className={`${INPUT} pr-11 font-semibold`} />
      <button type="button" onClick={onClear} aria-label={`Choose somebody else than ${person.name}`} className="absolute inset-y-0 right-0 flex w-11 items-center justify-center text-ink-3 hover:text-ink"><X size={16} aria-hidden /></button>
    </span>
  );
}

type SearchProps = { ids: FieldIds; kind: PickedKind; onPick: (person: PickedPerson) => void };

function Search({ ids, kind, onPick }: SearchProps) {
  const listId = useId();
  const { text, people, isOpen, active, message, type, close, onKeyDown } = useSearch(kind, onPick);
  const isShown = isOpen && people.length > 0;
  return (
    <span className="relative block">
      <input {...ids} type="text" role="combobox" aria-expanded={isShown} aria-controls={listId} aria-autocomplete="list" aria-activedescendant={isShown && active ? `${listId}-${active.id}` : undefined}
        autoComplete="off" value={text} onChange={(event) => type(event.target.value)} onKeyDown={onKeyDown} onBlur={close} placeholder="Type part of the name" className={INPUT} />
      <ul id={listId} role="listbox" aria-label="People found" hidden={!isShown} className="absolute inset-x-0 top-full z-30 mt-1 max-h-64 overflow-y-auto rounded border border-rule bg-sheet p-1 shadow-lg">
        {people.map((person) => <PersonOption key={person.id} id={`${listId}-${person.id}`} person={person} isActive={person.id === active?.id} onPick={onPick} />)}
      </ul>
      <span role="status" className="text-small text-ink-3">{message}</span>
    </span>
  );
}

const SHORTEST_TEXT = 2;

function useSearch(kind: PickedKind, onPick: (person: PickedPerson) => void) {
  const [text, setText] = useState('');
  const [isOpen, setIsOpen] = useState(false);
  const [at, setAt] = useState(0);
  const { data, isError } = usePeople(kind, text);
  const isAsked = text.trim().length >= SHORTEST_TEXT;
  const people = isAsked ? (data ?? []) : [];
  const active = people[Math.min(at, people.length - 1)];
  const move = (step: number) => { setIsOpen(true); setAt((before) => Math.max(0, Math.min(people.length - 1, before + step))); };
  const keys: Record<string, (() => void) | undefined> = {
    ArrowDown: () => move(1), ArrowUp: () => move(-1), Enter: isOpen && active ? () => onPick(active) : undefined, Escape: isOpen ? () => setIsOpen(false) : undefined,
  };
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    const act = keys[event.key];
    if (!act) return;
    event.preventDefault();
    act();
  };
  const type = (typed: string) => { setText(typed); setAt(0); setIsOpen(true); };
  return { text, people, isOpen, active, message: wordsOf({ isError, isNobody: isAsked && isOpen && data?.length === 0, text }), type, close: () => setIsOpen(false), onKeyDown };
}

function wordsOf({ isError, isNobody, text }: { isError: boolean; isNobody: boolean; text: string }): string {
  if (isError) return 'The names cannot be read just now. Type again to retry.';
  return isNobody ? `Nobody found for “${text}”.` : '';
}

function PersonOption({ id, person, isActive, onPick }: { id: string; person: PickedPerson; isActive: boolean; onPick: (person: PickedPerson) => void }) {
  return (
    // The field keeps the focus; the list is worked from there by keys. Pressing the mouse must not take the focus away first.
    <li id={id} role="option" tabIndex={-1} aria-selected={isActive} onMouseDown={(event) => event.preventDefault()} onClick={() => onPick(person)} onKeyDown={(event) => event.key === 'Enter' && onPick(person)}
      className={`flex cursor-pointer items-baseline justify-between gap-3 rounded px-3 py-2 tap ${isActive ? 'bg-wash' : ''}`}>
      <span className="font-semibold">{person.name}</span>
      <span className="text-small text-ink-3">{person.detail}</span>
    </li>
  );
}
