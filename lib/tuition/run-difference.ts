import { say, type MoneyWords } from '../explained';
import { listOf, plural } from '../format';
import { sumOf } from '../money';

/** A tuition line as far as two runs are compared. `discounts` are the labels of its steps. */
export type ComparedLine = { enrolmentId: string; text: string; quantity: number; unitMinor: number; netMinor: number; discounts: readonly string[] };
export type Difference = { kind: 'new' | 'gone' | 'changed' | 'same'; sentence: string };

const studentOf = ({ text }: ComparedLine) => text.split(':')[0] ?? text;
const nameOf = ({ text }: ComparedLine) => text.split(',')[0] ?? text;

/** What is different for one family beside the last run, and why, in words. */
export function differenceOf(before: readonly ComparedLine[] | null, after: readonly ComparedLine[], words: MoneyWords): Difference {
  if (before === null) return { kind: 'new', sentence: 'First bill of this family' };
  if (after.length === 0) return { kind: 'gone', sentence: `Nothing to charge any more; last time ${say(sumOf(before.map(({ netMinor }) => netMinor)), words)}` };
  const started = after.filter((line) => !before.some(({ enrolmentId }) => enrolmentId === line.enrolmentId)).map((line) => `new: ${nameOf(line)}`);
  const ended = before.filter((line) => !after.some(({ enrolmentId }) => enrolmentId === line.enrolmentId)).map((line) => `ended: ${nameOf(line)}`);
  const changed = after.flatMap((line) => {
    const old = before.find(({ enrolmentId }) => enrolmentId === line.enrolmentId);
    const reasons = old ? changesOf(old, line, words) : [];
    return reasons.length > 0 ? [{ name: studentOf(line), reasons }] : [];
  });
  const isOne = after.length === 1;
  const all = [...started, ...ended, ...changed.map(({ name, reasons }) => `${isOne ? '' : `${name}: `}${listOf(reasons, words.locale)}`)];
  if (all.length === 0) return { kind: 'same', sentence: 'As last time' };
  const sentence = all.join('; ');
  return { kind: 'changed', sentence: sentence.charAt(0).toUpperCase() + sentence.slice(1) };
}

function changesOf(old: ComparedLine, line: ComparedLine, words: MoneyWords): string[] {
  const reasons: string[] = [];
  if (old.quantity !== line.quantity) reasons.push(`${plural(line.quantity, 'lesson')} instead of ${old.quantity}`);
  if (old.unitMinor !== line.unitMinor) reasons.push(`price ${say(old.unitMinor, words)} → ${say(line.unitMinor, words)}`);
  for (const label of line.discounts) if (!old.discounts.includes(label)) reasons.push(`${label} added`);
  for (const label of old.discounts) if (!line.discounts.includes(label)) reasons.push(`${label} no longer`);
  if (reasons.length === 0 && old.netMinor !== line.netMinor) reasons.push(`amount ${say(old.netMinor, words)} → ${say(line.netMinor, words)}`);
  return reasons;
}
