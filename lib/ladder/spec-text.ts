import { readSymbol } from '../harmony/chord';
import { isDegree } from '../harmony/degree';
import type { AskedChord } from './play-spec';

/**
 * What a rung asks, as a teacher writes it: a turn a line, its chords parted by a bar line, each "step kind: stack",
 * several stacks parted by "or", and where it must lie in square brackets.
 *
 *   2 m11: 1-11-b7-b3-5 [root 47-58] | 5 13: 1-b7-3-13-9 [root 41-52] | 1 maj9: 1-3-7-9-5 [root 47-58]
 */
export type TurnsReading = { kind: 'turns'; turns: AskedChord[][] } | { kind: 'refused'; message: string };

const PLACES = { '': 'register', root: 'rootRegister', top: 'topRegister' } as const;
const MOST_TURNS = 24;

export function turnsText(turns: readonly (readonly AskedChord[])[]): string {
  return turns.map((turn) => turn.map(chordText).join(' | ')).join('\n');
}

function chordText({ step, suffix, stacks, register, rootRegister, topRegister }: AskedChord): string {
  const place = [register && `[${register.lowest}-${register.highest}]`, rootRegister && `[root ${rootRegister.lowest}-${rootRegister.highest}]`, topRegister && `[top ${topRegister.lowest}-${topRegister.highest}]`].filter(Boolean);
  return [`${step} ${suffix === '' ? 'major' : suffix}${stacks.length > 0 ? `: ${stacks.join(' or ')}` : ''}`, ...place].join(' ');
}

export function readTurns(text: string): TurnsReading {
  const lines = text.split('\n').map((line) => line.trim()).filter((line) => line !== '');
  if (lines.length === 0) return refused('Write what is asked, for example: 1 maj9: 1-3-7-9-5');
  if (lines.length > MOST_TURNS) return refused(`At most ${MOST_TURNS} lines.`);
  const turns: AskedChord[][] = [];
  for (const [at, line] of lines.entries()) {
    const turn = line.split('|').map((part) => readChord(part.trim()));
    const problem = turn.find((chord) => typeof chord === 'string');
    if (problem !== undefined) return refused(`Line ${at + 1}: ${problem}`);
    turns.push(turn.filter((chord) => typeof chord !== 'string'));
  }
  return { kind: 'turns', turns };
}

const refused = (message: string): TurnsReading => ({ kind: 'refused', message });

const CHORD = /^(?<step>\S+)\s+(?<kind>[^:[\]]+?)\s*(?::\s*(?<stacks>[^[\]]+?)\s*)?(?<places>(?:\[[^\]]*\]\s*)*)$/;

function readChord(text: string): AskedChord | string {
  const [step, kind, stacksText, places] = partsOf(text);
  if (step === '') return `“${text}” is not “step kind: stack”.`;
  if (!isDegree(step)) return `“${step}” is no step above the key. Write 1, b2 as b9, 2, b3 and so on.`;
  const suffix = kind === 'major' ? '' : kind;
  const stacks = stacksText === '' ? [] : stacksText.split(/\s+or\s+/);
  const problem = chordProblem(kind, suffix, stacks);
  if (problem !== null) return problem;
  const place = readPlace(places);
  return typeof place === 'string' ? place : { step, suffix, stacks, ...place };
}

function partsOf(text: string): [step: string, kind: string, stacks: string, places: string] {
  const { step = '', kind = '', stacks = '', places = '' } = CHORD.exec(text)?.groups ?? {};
  return [step, kind, stacks, places];
}

function chordProblem(kind: string, suffix: string, stacks: readonly string[]): string | null {
  if (readSymbol(`C${suffix}`).kind !== 'chord') return `“${kind}” is no kind of chord.`;
  const strange = stacks.flatMap((stack) => stack.split('-')).find((degree) => !isDegree(degree));
  return strange === undefined ? null : `“${strange}” is no degree. Write for example 1-b7-3-13-9.`;
}

function readPlace(text: string): Partial<AskedChord> | string {
  const place: Partial<AskedChord> = {};
  for (const bracket of text.match(/\[[^\]]*\]/g) ?? []) {
    const found = /^\[(?:(root|top)\s+)?(\d{2,3})\s*-\s*(\d{2,3})\]$/.exec(bracket);
    const [lowest, highest] = [Number(found?.[2]), Number(found?.[3])];
    if (!found || lowest > highest || lowest < 21 || highest > 108) return `${bracket} is not a place on the keyboard. Write for example [48-72] or [root 41-52]; 60 is middle C.`;
    place[PLACES[(found[1] ?? '') as keyof typeof PLACES]] = { lowest, highest };
  }
  return place;
}
