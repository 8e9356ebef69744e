'use client';

import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { formatDate } from '@/lib/format';
import { isSpoken } from '@/lib/ladder/play-spec';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { agreeToHearing, beginHearing } from '../../actions';

type StartPanelProps = { screen: HearingScreen; rung: NonNullable<HearingScreen['rung']>; locale: string };

/** Before it begins: what the rung asks, and what stands against hearing it today. */
export function StartPanel({ screen, rung, locale }: StartPanelProps) {
  const { problems, hasAgreement } = screen;
  const closed = closedBecause(screen, rung);
  return (
    <section className="sheet min-w-0 p-4 md:px-5 md:py-[18px]" aria-label="Before the hearing">
      <p className="eyebrow">{`Rung ${rung.code}`}</p>
      <h2 className="mt-1 text-[26px]">{rung.title}</h2>
      <p className="mt-2 max-w-[60ch]">{`Whoever passes it can ${rung.canDo}.`}</p>
      <dl className="mt-4 grid max-w-[60ch] gap-x-4 gap-y-2 sm:grid-cols-[140px_1fr]">
        <dt className="font-semibold">How it is heard</dt><dd>{howHeard(rung)}</dd>
        <dt className="font-semibold">Listen for</dt><dd>{rung.criteria.listenFor}</dd>
      </dl>
      {problems.length > 0 ? (
        <ul className="mt-4 grid gap-2" aria-label="What stands against it">
          {problems.map(({ text, until }) => <li key={text} className="rounded bg-brass-wash px-3 py-2 text-brass">{text}{until ? ` From ${formatDate(until, locale, 'day')} it may be heard again.` : ''}</li>)}
        </ul>
      ) : null}
      {hasAgreement ? <p className="mt-3"><Chip tone="ok">The lead has agreed</Chip></p> : null}
      <div className="mt-5">{closed === null ? <StartControls screen={screen} rung={rung} /> : <p className="rounded bg-wash px-3 py-2">{closed}</p>}</div>
    </section>
  );
}

/** Why nobody can begin here at all, or null. */
function closedBecause({ underWay, may }: HearingScreen, { state }: StartPanelProps['rung']): string | null {
  if (underWay) return `${underWay.byName} is hearing this rung now.`;
  if (state === 'passed') return 'This rung is passed. Choose another on the ladder.';
  return may.hear ? null : 'Rungs are heard by the teacher who teaches this student, or by the lead.';
}

function howHeard({ spec, criteria, keysDrawn, keysNeeded }: StartPanelProps['rung']): string {
  const many = keysDrawn === keysNeeded ? `all ${keysDrawn}` : `${keysNeeded} of ${keysDrawn}`;
  const when = criteria.seconds ? `, each within ${criteria.seconds} seconds` : criteria.tempo ? `, at ${criteria.tempo.beatsPerMinute} beats a minute` : '';
  return isSpoken(spec.how) ? `It is told, not played: ${many} right${when}.` : `Keys are drawn, weak ones sooner: ${many} right${when}. The notes are checked as they are played.`;
}

const SHORTEST_REASON = 3;

function LeadWord({ mayAgree, reason, onReason }: { mayAgree: boolean; reason: string; onReason: (reason: string) => void }) {
  if (!mayAgree) return <p className="text-ink-3">The lead may agree to it all the same.</p>;
  return <TextField label="As lead you may agree all the same: why?" value={reason} onChange={(event) => onReason(event.target.value)} />;
}

function StartControls({ screen, rung }: Omit<StartPanelProps, 'locale'>) {
  const { problems, hasAgreement, may, ladder, lesson } = screen;
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string>();
  const [isPending, startTransition] = useTransition();
  const studentId = ladder.student.id;
  const isBlocked = problems.length > 0 && !hasAgreement;
  const run = (work: () => Promise<{ ok: boolean; message?: string } | null>) => startTransition(async () => {
    const result = await work().catch(() => null);
    setProblem(result?.ok ? undefined : (result?.message ?? 'This did not reach the school. Press again.'));
  });
  const begin = () => run(() => beginHearing({ studentId, rungId: rung.id, ...(lesson ? { occurrenceId: lesson.id } : {}), leadReason: reason }));
  const agree = () => run(() => agreeToHearing({ studentId, rungId: rung.id, reason }));
  const isReasoned = reason.trim().length >= SHORTEST_REASON;
  return (
    <div className="grid max-w-[520px] gap-3">
      {may.isQualified ? null : <p className="rounded bg-wash px-3 py-2">{`Your qualification does not reach level ${rung.levelNo}. A colleague who has it, or the lead, can hear this rung.`}</p>}
      {isBlocked ? <LeadWord mayAgree={may.agree} reason={reason} onReason={setReason} /> : null}
      <FormError message={problem} />
      <div className="flex flex-wrap gap-3">
        <Button kind="brass" pending={isPending} disabled={!may.isQualified || (isBlocked && !(may.agree && isReasoned))} onClick={begin}>Begin the hearing</Button>
        {isBlocked && may.agree ? <Button pending={isPending} disabled={!isReasoned} onClick={agree}>Let the teacher hear it</Button> : null}
      </div>
    </div>
  );
}
