import type { ReactNode } from 'react';

type SheetProps = { title?: ReactNode; eyebrow?: ReactNode; action?: ReactNode; children: ReactNode; className?: string; id?: string; flush?: boolean };

/** A piece of paper on the desk: white, one thin rule around it. `flush` leaves the padding to its content (tables). */
export function Sheet({ title, eyebrow, action, children, className = '', id, flush = false }: SheetProps) {
  const hasHead = title !== undefined || eyebrow !== undefined || action !== undefined;
  return (
    <section id={id} className={`sheet min-w-0 ${flush ? '' : 'p-4'} ${className}`}>
      {hasHead ? (
        <header className={`flex items-start justify-between gap-3 ${flush ? 'p-4' : 'mb-3'}`}>
          <div>
            {eyebrow !== undefined ? <p className="eyebrow">{eyebrow}</p> : null}
            {title !== undefined ? <h2 className="text-h2">{title}</h2> : null}
          </div>
          {action}
        </header>
      ) : null}
      {children}
    </section>
  );
}
