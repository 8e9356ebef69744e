import { say, sayPercent, type MoneyWords } from '../explained';
import { BASIS_POINTS, splitByWeights, sumOf } from '../money';

/** `kind` is a kind of charge, or '*' for everything without a rule of its own. */
export type SplitRule =
  | { kind: string; method: 'percent'; parts: readonly { payerId: string; bp: number }[] }
  | { kind: string; method: 'whole'; parts: readonly { payerId: string }[] }
  | { kind: string; method: 'fixed_then_rest'; parts: readonly { payerId: string; amountMinor: number }[]; remainderPayerId: string };

export type Charge = { kind: string; amountMinor: number };
export type SharePart = { kind: string; wholeMinor: number; amountMinor: number; shareBp: number | null; sentence: string };
export type Share = { payerId: string; amountMinor: number; parts: SharePart[] };

/**
 * Who pays what of a bill (S16). The charges of one kind are added first and cut once, by largest remainder, so that
 * the shares always add up to the bill. Each payer's sentences speak of that payer's part only.
 */
export function splitCharges(charges: readonly Charge[], rules: readonly SplitRule[], defaultPayerId: string, words: MoneyWords): Share[] {
  const shares = new Map<string, SharePart[]>();
  for (const kind of new Set(charges.map((charge) => charge.kind))) {
    const wholeMinor = sumOf(charges.filter((charge) => charge.kind === kind).map(({ amountMinor }) => amountMinor));
    for (const { payerId, ...part } of partsOf(kind, wholeMinor, ruleFor(kind, rules, defaultPayerId))) {
      const sentence = sentenceOf(kind, wholeMinor, part, words);
      shares.set(payerId, [...(shares.get(payerId) ?? []), { kind, wholeMinor, ...part, sentence }]);
    }
  }
  return [...shares].map(([payerId, parts]) => ({ payerId, amountMinor: sumOf(parts.map(({ amountMinor }) => amountMinor)), parts }));
}

const ruleFor = (kind: string, rules: readonly SplitRule[], defaultPayerId: string): SplitRule =>
  rules.find((rule) => rule.kind === kind) ?? rules.find((rule) => rule.kind === '*') ?? { kind: '*', method: 'whole', parts: [{ payerId: defaultPayerId }] };

type Part = { payerId: string; amountMinor: number; shareBp: number | null };

function partsOf(kind: string, wholeMinor: number, rule: SplitRule): Part[] {
  switch (rule.method) {
    case 'whole': return rule.parts.slice(0, 1).map(({ payerId }) => ({ payerId, amountMinor: wholeMinor, shareBp: BASIS_POINTS }));
    case 'percent': {
      const amounts = splitByWeights(wholeMinor, rule.parts.map(({ bp }) => bp));
      return rule.parts.map(({ payerId, bp }, index) => ({ payerId, amountMinor: amounts[index] ?? 0, shareBp: bp })).filter(({ shareBp }) => shareBp > 0);
    }
    case 'fixed_then_rest': return fixedParts(wholeMinor, rule.parts, rule.remainderPayerId);
  }
}

function fixedParts(wholeMinor: number, parts: readonly { payerId: string; amountMinor: number }[], remainderPayerId: string): Part[] {
  let left = wholeMinor;
  const fixed = parts.map(({ payerId, amountMinor }) => {
    const taken = wholeMinor >= 0 ? Math.min(amountMinor, left) : 0;
    left -= taken;
    return { payerId, amountMinor: taken, shareBp: null };
  });
  return left === 0 ? fixed.filter(({ amountMinor }) => amountMinor !== 0) : [...fixed, { payerId: remainderPayerId, amountMinor: left, shareBp: null }];
}

const CHARGE_WORDS: Record<string, string> = {
  tuition: 'Tuition', registration: 'Registration', trial: 'Trial lesson', book: 'Books', recital: 'Recital', rental: 'Rental', assessment: 'Assessment', fee: 'Fees', package: 'Package', workshop: 'Workshop',
};
const chargeWords = (kind: string): string => CHARGE_WORDS[kind] ?? 'Other';

function sentenceOf(kind: string, wholeMinor: number, part: Omit<Part, 'payerId'>, words: MoneyWords): string {
  const name = chargeWords(kind);
  if (part.shareBp === BASIS_POINTS) return `${name}: ${say(part.amountMinor, words)}`;
  if (part.shareBp === null) return `${name}, your agreed part: ${say(part.amountMinor, words)}`;
  return `${name}: your ${sayPercent(part.shareBp)} of ${say(wholeMinor, words)} = ${say(part.amountMinor, words)}`;
}

/** A credit goes back the way the line was shared: by the payers' parts of that kind of charge, to the last cent (S17). */
export const splitCredit = (creditMinor: number, parts: readonly { payerId: string; amountMinor: number }[]): { payerId: string; amountMinor: number }[] => {
  const amounts = splitByWeights(creditMinor, parts.map(({ amountMinor }) => amountMinor));
  return parts.map(({ payerId }, index) => ({ payerId, amountMinor: amounts[index] ?? 0 }));
};
