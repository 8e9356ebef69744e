import type { ReactNode } from 'react';

type PageHeaderProps = { title: ReactNode; sub?: ReactNode; actions?: ReactNode };

export function PageHeader({ title, sub, actions }: PageHeaderProps) {
  return (
    <header className="flex flex-wrap items-start gap-x-4 gap-y-3 pb-4 pt-5 md:pt-[22px]">
      <div className="min-w-0 flex-1 basis-60">
        <h1 className="text-[24px] md:text-h1">{title}</h1>
        {sub ? <p className="mt-1 text-ink-3">{sub}</p> : null}
      </div>
      {actions ? <div className="no-print flex flex-wrap items-center gap-3">{actions}</div> : null}
    </header>
  );
}
