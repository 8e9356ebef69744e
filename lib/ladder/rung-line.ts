import { formatDate, plural } from '../format';
import type { LadderRung } from './student-ladder';

/** What stands under a rung's name: "passed 20 Oct", "locked: needs 3 rungs", "next". */
export function rungLine(rung: LadderRung, { isNext, isHeardNow, locale }: { isNext: boolean; isHeardNow: boolean; locale: string }): string {
  if (isHeardNow) return 'hearing now';
  const on = rung.since ? ` ${formatDate(rung.since, locale)}` : '';
  const lines = {
    passed: `passed${on}`, credited: `credited${on}`, recheck_due: 'to be heard once more', working: 'being worked on', open: isNext ? 'next' : 'open', locked: lockedLine(rung),
  };
  return lines[rung.state];
}

const lockedLine = ({ missing }: LadderRung): string =>
  (missing.length === 1 ? `locked: first “${missing[0]?.title ?? ''}”` : `locked: needs ${plural(missing.length, 'rung')}`);
