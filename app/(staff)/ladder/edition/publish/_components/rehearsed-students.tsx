import { Sheet } from '@/components/ui/sheet';
import { sharePermille } from '@/lib/ladder/edition-change';
import type { RehearsedStudent } from '@/lib/ladder/server/publish-edition';

const share = (has: number, of: number): string => `${has} of ${of} (${(sharePermille(has, of) / 10).toFixed(1)} %)`;

/** Students by name, before and after. */
export function RehearsedStudents({ title, students }: { title: string; students: readonly RehearsedStudent[] }) {
  if (students.length === 0) return null;
  return (
    <Sheet eyebrow={`${title}: ${students.length}`} flush>
      <ul className="max-h-[420px] overflow-y-auto">
        {students.map(({ studentId, name, hadBefore, ofBefore, hasAfter, ofAfter, heldUpBy }) => (
          <li key={studentId} className="num border-t border-rule px-4 py-2"><b>{name}</b> <span className="text-ink-2">{`${share(hadBefore, ofBefore)}, then ${share(hasAfter, ofAfter)}`}</span>{heldUpBy.length > 0 ? <span className="block text-small text-ink-3">{`To do: ${heldUpBy.join(', ')}`}</span> : null}</li>
        ))}
      </ul>
    </Sheet>
  );
}
