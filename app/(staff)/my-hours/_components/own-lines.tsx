'use client';

import { useState } from 'react';
import { PayLines } from '@/components/payroll/pay-lines';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { LineView, TeacherPay } from '@/lib/payroll/server/teacher-pay';
import { AskForm } from './ask-form';

/** The teacher's own lines; asking about one takes two presses. */
export function OwnLines({ pay, words }: { pay: TeacherPay; words: MoneyWords }) {
  const [asked, setAsked] = useState<LineView | null>(null);
  const askButton = (line: LineView) => <Button kind="quiet" className="no-print px-1 py-1" onClick={() => setAsked(line)} aria-label={`Ask about ${line.text} on ${formatDate(line.localDate, words.locale, 'short')}`}>Ask</Button>;
  return (
    <>
      <PayLines pay={pay} words={words} aside={pay.mayAnswer ? askButton : undefined} />
      <Dialog open={asked !== null} onOpenChange={(open) => !open && setAsked(null)} title="Ask about this line" description={asked ? `${formatDate(asked.localDate, words.locale, 'short')}, ${asked.text}, ${say(asked.amountMinor, words)}` : undefined}>
        {asked ? <AskForm pay={pay} line={asked} onClose={() => setAsked(null)} /> : null}
      </Dialog>
    </>
  );
}
