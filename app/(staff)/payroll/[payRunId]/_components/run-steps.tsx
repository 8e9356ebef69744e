'use client';

import { Download } from 'lucide-react';
import { useState, useTransition } from 'react';
import { Button, ButtonLink, buttonClass } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { DateField } from '@/components/ui/inputs';
import { say } from '@/lib/explained';
import { formatDate, plural } from '@/lib/format';
import type { PayRunScreen } from '@/lib/payroll/server/pay-run-screen';
import { approve, close, gather, send } from '../../actions';
import { nextStepOf, type NextStep } from './next-step';

const MAY_GATHER = ['gathering', 'with_teachers', 'answering_queries', 'ready_to_approve'];
type Outcome = { ok: true } | { ok: false; message: string } | null;
const faultOf = (result: Outcome): string | undefined => (result ? (result.ok ? undefined : result.message) : 'This did not reach the school. Nothing was changed; try again.');

/** The workbook, working out again, and the one next step of the run. */
export function RunSteps({ run, locale }: { run: PayRunScreen; locale: string }) {
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const again = () => startTransition(async () => setError(faultOf(await gather({ payRunId: run.payRunId }).catch(() => null))));
  const next = nextStepOf(run);
  return (
    <div className="flex flex-col gap-1 md:items-end">
      <div className="flex flex-wrap gap-3">
        <ButtonLink href="/payroll" kind="quiet">All runs</ButtonLink>
        <a href={`/api/payroll/${run.payRunId}/workbook`} download className={buttonClass('plain')}><Download size={16} aria-hidden />Workbook</a>
        {MAY_GATHER.includes(run.state) ? <Button pending={pending} onClick={again}>Work out again</Button> : null}
        {next ? <NextButton run={run} next={next} locale={locale} /> : null}
      </div>
      {next?.why ? <p id="why-not-yet" className="text-small text-ink-3">{next.why}</p> : null}
      {error ? <p role="alert" className="text-small text-brick">{error}</p> : null}
    </div>
  );
}

function NextButton({ run, next, locale }: { run: PayRunScreen; next: NextStep; locale: string }) {
  const [isAsking, setIsAsking] = useState(false);
  const [error, setError] = useState<string>();
  const [answerByOn, setAnswerByOn] = useState(run.today);
  const [pending, startTransition] = useTransition();
  const { payRunId } = run;
  const works = { send: () => send({ payRunId, answerByOn }), approve: () => approve({ payRunId }), close: () => close({ payRunId }) };
  const confirm = () => startTransition(async () => {
    const result = await works[next.kind]().catch(() => null);
    setError(faultOf(result));
    if (result?.ok) setIsAsking(false);
  });
  const { button, consequences } = WORDS[next.kind](run, locale);
  return (
    <>
      <Button kind="primary" disabled={next.why !== null} aria-describedby={next.why ? 'why-not-yet' : undefined} onClick={() => { setError(undefined); setIsAsking(true); }}>{button}</Button>
      <ConfirmDialog open={isAsking} onOpenChange={setIsAsking} title={`${button}?`} consequences={consequences} confirmLabel={button} pending={pending} error={error} onConfirm={confirm}>
        {next.kind === 'send' ? <DateField label="Answers by" value={answerByOn} min={run.today} onChange={(event) => setAnswerByOn(event.target.value)} /> : null}
      </ConfirmDialog>
    </>
  );
}

type Words = { button: string; consequences: string[] };

const WORDS: Record<NextStep['kind'], (run: PayRunScreen, locale: string) => Words> = {
  send: (run) => ({ button: 'Send for checking', consequences: [`${plural(run.teachers.length, 'mail')}: each teacher is asked to look at their own lines.`, 'Nothing is paid or closed by this.'] }),
  approve: (run, locale) => ({ button: 'Approve', consequences: [`${say(run.totals.grossMinor, { currency: run.currency, locale })} gross for ${plural(run.teachers.length, 'teacher')} is approved.`, 'Lines can no longer be changed in this run.'] }),
  close: (run, locale) => ({
    button: 'Close the run',
    consequences: [
      `${plural(run.teachers.length, 'pay statement')} over ${say(run.totals.grossMinor + run.totals.reimbursementMinor, { currency: run.currency, locale })} are written and mailed.`,
      `The lessons up to ${formatDate(run.endsOn, locale)} are locked; a later change goes into the next run as a correction.`, 'A closed run cannot be opened again.',
    ],
  }),
};
