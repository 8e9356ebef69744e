import Link from 'next/link';

const SECTIONS = [{ href: '/tuition', label: 'Runs' }, { href: '/tuition/invoices', label: 'Invoices' }, { href: '/tuition/payments', label: 'Payments' }] as const;

/** The three parts of tuition. */
export function TuitionSections({ current }: { current: (typeof SECTIONS)[number]['href'] }) {
  return (
    <nav aria-label="Tuition" className="no-print mb-4 flex gap-1 overflow-x-auto border-b border-rule-strong">
      {SECTIONS.map(({ href, label }) => (
        <Link key={href} href={href} aria-current={href === current ? 'page' : undefined} className={`whitespace-nowrap border-b-2 px-3 py-2 font-semibold tap ${href === current ? 'border-brass-fill text-ink' : 'border-transparent text-ink-3'}`}>
          {label}
        </Link>
      ))}
    </nav>
  );
}
