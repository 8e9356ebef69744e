'use client';

import { useRouter } from 'next/navigation';
import { JobProgress } from '@/components/ui/job-progress';
import { Sheet } from '@/components/ui/sheet';

/** The page may be left; the work goes on and shows itself again. */
export function WorkUnderWay({ jobId }: { jobId: string }) {
  const router = useRouter();
  return (
    <Sheet className="mb-[14px]">
      <JobProgress jobId={jobId} onEnd={() => router.refresh()} />
      <p className="mt-2 text-small text-ink-3">You may leave this page; the work goes on.</p>
    </Sheet>
  );
}
