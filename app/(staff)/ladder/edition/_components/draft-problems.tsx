import { CircleCheck, TriangleAlert } from 'lucide-react';
import Link from 'next/link';
import type { EditionProblem } from '@/lib/ladder/edition-check';

/** What stands against publishing, each with the way to it; or that nothing does. */
export function DraftProblems({ problems }: { problems: readonly EditionProblem[] }) {
  if (problems.length === 0) return <p className="flex gap-2 rounded bg-felt-wash px-3 py-[10px] text-felt"><CircleCheck size={18} aria-hidden className="mt-[2px] shrink-0" />Every rung can be reached, fits the keyboard in each of its keys and has plain words.</p>;
  return (
    <section className="rounded bg-brick-wash px-3 py-[10px] text-brick" aria-label="What stands against publishing">
      <p className="flex gap-2 font-semibold"><TriangleAlert size={18} aria-hidden className="mt-[2px] shrink-0" />This stands against publishing</p>
      <ul className="mt-1 grid gap-1 pl-[26px]">
        {problems.map(({ rungId, text }) => <li key={text}>{rungId ? <Link href={`/ladder/edition/${rungId}`} className="underline">{text}</Link> : text}</li>)}
      </ul>
    </section>
  );
}
