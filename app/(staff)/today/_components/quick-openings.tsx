import { ButtonLink } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';

/** The errand of a telephone call starts here. */
export function QuickOpenings() {
  return (
    <Sheet eyebrow="Find an opening">
      <p className="mb-3 text-ink-2">While the caller talks: true openings first, then what nearly fits and the one rule in the way.</p>
      <ButtonLink href="/openings" className="w-full">Find an opening</ButtonLink>
    </Sheet>
  );
}
