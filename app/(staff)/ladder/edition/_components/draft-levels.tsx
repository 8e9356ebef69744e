import Link from 'next/link';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { MAPPING_RULES } from '@/lib/ladder/edition-change';
import type { DraftRungRow, DraftScreen } from '@/lib/ladder/server/edition-draft';

/** The draft level by level; what differs from the live edition says so. */
export function DraftLevels({ levels, leftOut }: Pick<DraftScreen, 'levels' | 'leftOut'>) {
  return (
    <>
      {levels.map(({ id, no, title, rungs }) => (
        <Sheet key={id} eyebrow={`Level ${no}`} title={title} flush>
          <ul>{rungs.map((rung) => <RungRow key={rung.id} rung={rung} />)}</ul>
        </Sheet>
      ))}
      {leftOut.length > 0 ? (
        <Sheet eyebrow="Left out">
          <ul className="grid gap-1">{leftOut.map(({ id, code, title, into }) => <li key={id}>{`${code} ${title}`} <span className="text-ink-3">{into.length > 0 ? `goes into ${into.join(' and ')}` : 'leads nowhere yet'}</span></li>)}</ul>
        </Sheet>
      ) : null}
    </>
  );
}

function RungRow({ rung: { id, code, title, plainTitle, isNew, isChanged, rule } }: { rung: DraftRungRow }) {
  return (
    <li className="border-t border-rule">
      <Link href={`/ladder/edition/${id}`} className="flex flex-wrap items-center gap-x-4 gap-y-1 px-4 py-3 text-ink no-underline hover:bg-wash/60">
        <span className="num w-10 text-ink-3">{code}</span>
        <span className="min-w-0 flex-1 basis-56"><b>{title}</b><span className="block text-small text-ink-3">{plainTitle}</span></span>
        {isNew ? <Chip tone="info">new</Chip> : isChanged ? <Chip tone="wait">changed</Chip> : null}
        {rule === 'same' || isNew ? null : <Chip>{MAPPING_RULES[rule]}</Chip>}
      </Link>
    </li>
  );
}
