'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { Dialog } from '@/components/ui/dialog';
import { JobProgress } from '@/components/ui/job-progress';
import { say } from '@/lib/explained';
import { formatDate, plural } from '@/lib/format';
import { sumOf } from '@/lib/money';
import type { RunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { previewRun, release } from '../../actions';

/** Looks again, and releases: what will happen is said first, and the progress can be left and come back to. */
export function ReleaseRun({ run, locale }: { run: RunDetail; locale: string }) {
  const router = useRouter();
  const [isAsking, setIsAsking] = useState(false);
  const [jobId, setJobId] = useState<string | null>(null);
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const planned = plannedOf(run).length;
  const confirm = () => startTransition(async () => {
    const result = await release({ runId: run.runId, controlTotalMinor: run.controlTotalMinor }).catch(() => null);
    if (!result?.ok) return setError(faultOf(result));
    setIsAsking(false);
    setJobId(result.data.jobId);
  });
  const again = () => startTransition(async () => {
    const result = await previewRun({ kind: run.kind, period: run.period, dueOn: run.dueOn }).catch(() => null);
    setError(faultOf(result));
    router.refresh();
  });
  return (
    <>
      {error && !isAsking ? <p role="alert" className="text-small text-brick">{error}</p> : null}
      {run.state === 'preview' ? <Button pending={pending && !isAsking} onClick={again}>Work out again</Button> : null}
      {run.state === 'preview' || run.state === 'releasing' ? <Button kind="brass" disabled={planned === 0 && run.state === 'preview'} onClick={() => { setError(undefined); setIsAsking(true); }}>{run.state === 'releasing' ? 'Go on releasing' : 'Release'}</Button> : null}
      <ConfirmDialog open={isAsking} onOpenChange={setIsAsking} title={`Release ${run.label}?`} kind="brass" confirmLabel={`Release ${plural(planned, 'bill')}`} pending={pending} error={error} onConfirm={confirm}
        consequences={consequencesOf(run, locale)} />
      <ReleaseProgress jobId={jobId} isDone={run.state === 'released'} onClose={() => setJobId(null)} onEnd={() => router.refresh()} />
    </>
  );
}

type ProgressProps = { jobId: string | null; isDone: boolean; onClose: () => void; onEnd: () => void };

function ReleaseProgress({ jobId, isDone, onClose, onEnd }: ProgressProps) {
  return (
    <Dialog open={jobId !== null} onOpenChange={(open) => !open && onClose()} title={isDone ? 'Released' : 'Releasing'} description={isDone ? 'Every bill has its number, and the mails are on their way.' : 'You can leave this page; the work goes on.'}>
      {jobId ? <JobProgress jobId={jobId} onEnd={onEnd} /> : null}
      <div className="mt-4 flex justify-end"><Button onClick={onClose}>{isDone ? 'See the run' : 'Leave it running'}</Button></div>
    </Dialog>
  );
}

const faultOf = (result: { ok: true } | { ok: false; message: string } | null): string | undefined => {
  if (!result) return 'This did not reach the school. Nothing was released; try again.';
  return result.ok ? undefined : result.message;
};

const plannedOf = ({ bills }: RunDetail) => bills.filter(({ state }) => state === 'planned');

function consequencesOf(run: RunDetail, locale: string): string[] {
  const planned = plannedOf(run);
  const total = say(sumOf(planned.map(({ totalMinor }) => totalMinor)), { currency: run.currency, locale });
  return [
    `${plural(planned.length, 'invoice')} over ${total}: each gets its number and cannot be changed afterwards.`,
    `${plural(run.mailCount, 'mail')}: one to each payer with their own share, due ${formatDate(run.dueOn, locale, 'short')}.`,
    run.held > 0 ? `${plural(run.held, 'family', 'families')} held back or with a problem: nothing yet.` : 'No family is held back.',
  ];
}
