import { chordName, type ChordStyle } from '../harmony/chord-name';
import { chordOf, spelledMembers } from '../harmony/chord';
import { degreesOf, printedDegree, type Degree, type VoicedNote } from '../harmony/degree';
import { judge } from '../harmony/judge';
import { optionOf, smoothestPath } from '../harmony/path-finder';
import { printedNote, type NoteName } from '../harmony/note';
import { placementsOf, targetName, type Target } from '../harmony/target';
import { roleOf, tensionUse } from '../harmony/tones';
import type { Verdict } from '../harmony/verdict';
import { chordRoot, keyLabel, writtenKey } from './keys';
import type { AskedChord, PlaySpec } from './play-spec';

/** One cell of the grid of keys: the key, and which of the rung's turns is asked in it. */
export type DrawnKey = { key: NoteName; turn: number };

/** One chord that is asked. `shown` is the voicing on the stave; any of `accepts` counts. */
export type Ask = { symbol: string; shown: Target; accepts: Target[]; /** in words, where no one voicing is asked */ answer: string | null };

/**
 * The chords of a drawn key, in order. Where a chord may be voiced in several ways or octaves, the shown path is
 * the one whose voices move least in all.
 */
export function asksOf(spec: PlaySpec, { key, turn }: DrawnKey): Ask[] {
  const asked = spec.turns[turn];
  if (!asked) throw new Error(`the rung has no turn ${turn}`);
  const written = writtenKey(key, asked);
  const symbols = asked.map((chord) => chordRoot(written, chord) + chord.suffix);
  if (spec.how !== 'voicing') return symbols.map((symbol) => unvoiced(spec, symbol));
  const options = asked.map((chord, at) => optionsOf(symbols[at] ?? '', chord));
  const path = smoothestPath(options.map((row) => row.map((notes) => optionOf(notes, ''))));
  return symbols.map((symbol, at) => {
    const chord = chordOf(symbol);
    const accepts = (options[at] ?? []).map((notes): Target => ({ chord, notes }));
    return { symbol, shown: { chord, notes: path?.voicings[at]?.notes ?? [] }, accepts, answer: null };
  });
}

function optionsOf(symbol: string, asked: AskedChord): VoicedNote[][] {
  const options = asked.stacks.flatMap((stack) => placementsOf(chordOf(symbol).root, degreesOf(stack), asked));
  if (options.length === 0) throw new Error(`${symbol} fits nowhere in its register`);
  return options;
}

function unvoiced(spec: PlaySpec, symbol: string): Ask {
  const target: Target = { chord: chordOf(symbol), notes: [] };
  return { symbol, shown: target, accepts: [target], answer: answerWords(spec, target) };
}

/** Hears played keys against every voicing that counts; the verdict is against the one they come nearest to. */
export function judgeAsk({ accepts, shown }: Ask, played: readonly number[]): Verdict {
  const right = accepts.map((target) => judge(target, played)).find((verdict) => verdict.isRight);
  if (right) return right;
  const inCommon = ({ notes }: Target) => notes.filter(({ key }) => played.includes(key)).length;
  return judge(accepts.reduce((best, target) => (inCommon(target) > inCommon(best) ? target : best), shown), played);
}

const ASKED_TENSIONS: readonly Degree[] = ['9', '11', '13'];
const ALTERED_COLOURS: readonly Degree[] = ['b9', '#9', '#11', 'b13'];

/** What the teacher wants to hear where no one voicing is asked: letters, or what may be added. */
function answerWords({ how }: PlaySpec, { chord }: Target): string {
  if (how === 'spell') return spelledMembers(chord).map(printedNote).join('  ');
  if (chord.isAlt) return `${ALTERED_COLOURS.map(printedDegree).join(', ')} may be added, at least one of them.`;
  const uses = ASKED_TENSIONS.map((degree) => ({ degree, use: tensionUse(chord, degree) }));
  const said = chord.degrees.filter((degree) => roleOf(degree) === 'colour').map(printedDegree);
  const list = (use: string) => uses.filter((tension) => tension.use === use).map(({ degree }) => printedDegree(degree)).join(' and ');
  const [careful, out] = [list('caution'), list('avoid')];
  const parts = [
    how === 'free' && said.length > 0 ? `${said.join(' and ')} must sound` : '',
    list('available') && `${list('available')} may be added${careful && `, ${careful} with care`}`,
    out && `${out} ${out.includes('and') ? 'are' : 'is'} left out`,
  ];
  return `${parts.filter(Boolean).join('; ')}.`;
}

/** "Dm11": the heading of the hearing, without octaves and with the school's signs. */
export const askName = ({ shown }: Ask, style: ChordStyle): string => targetName(shown, style);
/** "1 11 ♭7 ♭3 5". */
export const askDegrees = ({ shown }: Ask): string => shown.notes.map(({ degree }) => printedDegree(degree)).join(' ');

export function drawnLabel(spec: PlaySpec, { key, turn }: DrawnKey, style: ChordStyle): string {
  const { isWholeChord, text } = keyLabel(spec, key, spec.turns[turn] ?? []);
  return isWholeChord ? chordName(chordOf(text), style) : text;
}
