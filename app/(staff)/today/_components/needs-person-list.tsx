import Link from 'next/link';
import { Sheet } from '@/components/ui/sheet';
import type { NeedsPerson } from '@/lib/calendar/needs-person';

export function NeedsPersonList({ needs, isToday }: { needs: readonly NeedsPerson[]; isToday: boolean }) {
  if (!isToday) return null;
  return (
    <Sheet eyebrow="Needs a person">
      {needs.length === 0 ? <p className="text-ink-2">Nothing just now. Everybody expected is here.</p> : (
        <ul className="-mt-1">
          {needs.map(({ kind, title, detail, href, action }) => (
            <li key={kind + title + detail} className="border-b border-rule py-3 first:pt-0 last:border-b-0 last:pb-0">
              <p className="font-semibold">{title}</p>
              <p className="text-small text-ink-3">{detail}</p>
              {href && action ? <Link href={href} className="mt-1 inline-block font-semibold text-petrol no-underline hover:underline">{action}</Link> : null}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
