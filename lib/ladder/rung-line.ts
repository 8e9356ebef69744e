import { formatDate, plural } from '../format';
import type { LadderRung } from './student-ladder';

/** What stands under a rung's name: "passed 20 Oct", "locked: needs 3 rungs", "next". */
export function rungLine(rung: LadderRung, { isNext, isHeardNow, locale }: { isNext: boolean; isHeardNow: boolean; locale: string }): string {
  const on = rung.since ? ` ${formatDate(rung.since, locale)}` : '';
  if (isHeardNow) return 'hearing now';
  switch (rung.state) {
    case 'passed': return `passed${on}`;
    case 'credited': return `credited${on}`;
    case 'recheck_due': return 'to be heard once more';
    case 'working': return 'being worked on';
    case 'open': return isNext ? 'next' : 'open';
    case 'locked': return rung.missing.length === 1 ? `locked: first “${rung.missing[0]?.title ?? ''}”` : `locked: needs ${plural(rung.missing.length, 'rung')}`;
  }
}
