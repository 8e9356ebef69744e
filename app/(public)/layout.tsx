import type { ReactNode } from 'react';
import { Wordmark } from '@/components/shell/mark';

export default function PublicLayout({ children }: { children: ReactNode }) {
  return (
    <div className="mx-auto flex min-h-dvh w-full max-w-[620px] flex-col px-4 pb-10">
      <div className="border-b border-rule py-4"><Wordmark /></div>
      <main id="content" tabIndex={-1} className="focus:outline-none flex-1">{children}</main>
    </div>
  );
}
