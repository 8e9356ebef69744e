import type { ReactNode } from 'react';
import { ButtonLink } from '../ui/button';
import { Wordmark } from './mark';

/** One message on an otherwise empty page. */
export function MessagePage({ title, children }: { title: string; children: ReactNode }) {
  return (
    <main id="content" className="mx-auto flex min-h-[70dvh] max-w-[560px] flex-col items-start justify-center gap-4 px-5 py-10">
      <Wordmark />
      <h1 className="text-h1">{title}</h1>
      <div className="text-ink-2">{children}</div>
      <ButtonLink href="/">Go to the first page</ButtonLink>
    </main>
  );
}
