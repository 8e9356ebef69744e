'use client';

import { Button } from '@/components/ui/button';
import { Progress } from '@/components/ui/progress';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState, ErrorState, ListSkeleton } from '@/components/ui/states';
import { Working } from '@/components/ui/working';

export function States() {
  return (
    <div className="flex flex-col gap-[18px]">
      <Sheet title="Nothing, not yet, not now">
        <EmptyState title="No enquiries" action={<Button kind="primary">New enquiry</Button>}>When a stranger asks for a trial lesson, it stands here with its next step.</EmptyState>
        <hr className="border-rule" />
        <div data-example><ListSkeleton rows={3} /></div>
        <hr className="border-rule" />
        <ErrorState />
      </Sheet>
      <Sheet title="Progress and workings">
        <div className="flex flex-col gap-4">
          <Progress label="Invoices" done={41} total={108} />
          <Progress label="Reading heron-court.xlsx" done={0} total={null} />
          <p>Tuition <Working figure={<span className="num font-semibold">€151.20</span>} steps={['15 lessons × €42.00 = €630.00', 'less 10 % second child = €567.00', '4 of 15 lessons returned: €567.00 × 4 ÷ 15 = €151.20']} /></p>
        </div>
      </Sheet>
    </div>
  );
}
