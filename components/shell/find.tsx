'use client';

import { useQuery } from '@tanstack/react-query';
import { Command } from 'cmdk';
import { Search } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { Dialog as Primitive } from 'radix-ui';
import { useEffect, useEffectEvent, useState } from 'react';
import { getJson } from '@/lib/http/get-json';
import type { Found } from '@/lib/people/found';
import { KeyHint } from '../ui/key-hint';
import { useReturnFocus } from '../ui/use-return-focus';

/** Find: people, rooms, dates and invoices from anywhere, with `/` or Ctrl-K. */
export function Find() {
  const router = useRouter();
  const returnFocus = useReturnFocus();
  const [open, setOpen] = useState(false);
  const [text, setText] = useState('');
  useFindKeys(() => setOpen(true));
  const { data, isFetching, isError } = useQuery({ queryKey: ['find', text], queryFn: () => getJson<Found[]>('/api/find', { text }), enabled: open && text.trim().length > 1, placeholderData: (previous) => previous });
  const go = (href: string) => {
    setOpen(false);
    setText('');
    router.push(href);
  };
  return (
    <>
      <button type="button" onClick={() => setOpen(true)} className="flex items-center justify-between gap-3 rounded border border-rule-strong bg-sheet px-3 py-[9px] text-[14px] text-ink-3 max-md:size-11 max-md:justify-center max-md:px-0 md:w-[250px]">
        <Search size={18} aria-hidden className="md:hidden" />
        <span className="max-md:sr-only">Find a person, room or date</span>
        <KeyHint keys="/" />
      </button>
      <Primitive.Root open={open} onOpenChange={setOpen}>
        <Primitive.Portal>
          <Primitive.Overlay className="appear fixed inset-0 z-40 bg-ink/40" />
          <Primitive.Content {...returnFocus} aria-describedby={undefined} className="appear fixed left-1/2 top-[10dvh] z-50 w-[min(620px,94vw)] -translate-x-1/2 overflow-hidden rounded-md border border-rule bg-sheet shadow-xl">
            <Primitive.Title className="sr-only">Find</Primitive.Title>
            <Command shouldFilter={false} label="Find">
              <Command.Input value={text} onValueChange={setText} placeholder="A name, a room, a date like 17 Nov, an invoice number" className="w-full border-b border-rule bg-sheet px-4 py-4 text-lead outline-none placeholder:text-ink-3" />
              <Command.List className="max-h-[55dvh] overflow-y-auto p-2">
                {text.trim().length < 2 ? <p className="px-3 py-4 text-ink-3">Type at least two letters.</p> : null}
                {isError ? <p role="alert" className="px-3 py-4 text-brick">Find does not answer just now. Type again to retry.</p> : null}
                {data?.length === 0 && !isFetching ? <p className="px-3 py-4 text-ink-3">Nothing found for “{text}”.</p> : null}
                {text.trim().length > 1 ? data?.map((found) => (
                  <Command.Item key={found.href + found.title} value={found.href + found.title} onSelect={() => go(found.href)} className="flex cursor-pointer items-baseline justify-between gap-4 rounded px-3 py-2 data-[selected=true]:bg-wash">
                    <span className="min-w-0 truncate font-semibold">{found.title}</span>
                    <span className="shrink-0 text-small text-ink-3">{found.detail}</span>
                  </Command.Item>
                )) : null}
              </Command.List>
            </Command>
          </Primitive.Content>
        </Primitive.Portal>
      </Primitive.Root>
    </>
  );
}

const isTypingPlace = (target: EventTarget | null): boolean => target instanceof HTMLElement && (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));
const isPlainSlash = (event: KeyboardEvent): boolean => event.key === '/' && !event.ctrlKey && !event.metaKey && !event.altKey && !isTypingPlace(event.target);
const isControlK = (event: KeyboardEvent): boolean => event.key.toLowerCase() === 'k' && (event.ctrlKey || event.metaKey);

/** `/` outside of fields, Ctrl-K (or the command key) anywhere. */
function useFindKeys(open: () => void): void {
  const latest = useEffectEvent(open);
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (!isPlainSlash(event) && !isControlK(event)) return;
      event.preventDefault();
      latest();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
}
