'use client';

import { useEffect, useRef } from 'react';
import { useJob, type JobProgress as JobState } from '../queries/use-job';
import { Progress } from './progress';

/** The progress of slow work; it goes on when the page is left, and this shows it again on coming back. */
export function JobProgress({ jobId, onEnd }: { jobId: string; onEnd?: (job: JobState) => void }) {
  const { data, isError } = useJob(jobId);
  const ended = useRef(false);
  useEffect(() => {
    if (ended.current || (data?.state !== 'done' && data?.state !== 'failed')) return;
    ended.current = true;
    onEnd?.(data);
  }, [data, onEnd]);
  if (isError) return <p role="alert" className="text-brick">The progress cannot be read just now; the work goes on.</p>;
  if (data?.state === 'failed') return <p role="alert" className="text-brick">{data.message}</p>;
  return <Progress label={data?.label ?? 'Starting'} done={data?.doneCount ?? 0} total={data?.totalCount ?? null} />;
}
