import { Button } from '@/components/ui/button';
import { SelectField, TextArea, TextField } from '@/components/ui/inputs';
import { FORM_NAMES, FORMS } from '@/lib/harmony/forms';
import { plainKeyName, printedNote } from '@/lib/harmony/note';
import { PROGRESSION_KEYS } from '@/lib/harmony/progression';
import { PROGRESSIONS } from '@/lib/harmony/roman';
import type { VoicingQuery } from '@/lib/ladder/voicing-finder';
import Link from 'next/link';

const LOWEST = [36, 41, 45, 48, 52, 55];
const HIGHEST = [64, 67, 69, 72, 77, 84];
const keys = (numbers: readonly number[], also: number) => [...new Set([...numbers, also])].sort((a, b) => a - b).map((key) => ({ value: String(key), label: plainKeyName(key) }));

/** A plain form that changes the address: it works before any script has come. */
export function FinderForm({ query }: { query: VoicingQuery }) {
  return (
    <form method="get" action="/voicings" className="no-print sheet grid gap-3 p-4" aria-label="What to voice">
      <TextArea label="Chords" name="chords" rows={3} defaultValue={query.chords} key={query.chords} maxLength={600} help="Dm9 G13 Cmaj9, or numerals in a key: IIm9 V13 Imaj9. A dot repeats a chord." />
      <SelectField label="Key of the numerals" name="tonic" defaultValue={query.tonic} key={`key ${query.tonic}`} options={PROGRESSION_KEYS.map((note) => ({ value: note, label: printedNote(note) }))} />
      <details className="group border-t border-rule pt-2">
        <summary className="py-1 tap"><span className="font-semibold text-petrol">Forms, register and hand</span><span className="block text-small text-ink-3">{`${query.forms.map((form) => FORMS[form]).join(', ')}; ${plainKeyName(query.lowest)} to ${plainKeyName(query.highest)}`}</span></summary>
        <div className="mt-2 grid gap-3">
          <fieldset className="grid gap-1">
            <legend className="mb-1 text-[14px] font-semibold">Forms</legend>
            {FORM_NAMES.map((form) => (
              <label key={form} className="flex items-center gap-2 py-[3px] tap"><input type="checkbox" name="forms" value={form} defaultChecked={query.forms.includes(form)} className="size-[18px] accent-ink" />{FORMS[form]}</label>
            ))}
          </fieldset>
          <div className="grid grid-cols-2 gap-3">
            <SelectField label="From" name="lowest" defaultValue={String(query.lowest)} options={keys(LOWEST, query.lowest)} />
            <SelectField label="Up to" name="highest" defaultValue={String(query.highest)} options={keys(HIGHEST, query.highest)} />
            <TextField label="Reach of a hand" name="reach" inputMode="numeric" defaultValue={String(query.reach)} help="in half steps; 12 is an octave" />
            <TextField label="Tempo" name="tempo" inputMode="numeric" defaultValue={String(query.tempo)} help="beats a minute" />
          </div>
        </div>
      </details>
      <Button type="submit" kind="primary">Find the smoothest way</Button>
      <nav aria-label="Known progressions" className="border-t border-rule pt-3">
        <p className="eyebrow">Or begin with</p>
        <ul className="mt-1">
          {Object.values(PROGRESSIONS).map(({ name, numerals }) => (
            <li key={name}><Link className="inline-block py-1 font-semibold text-petrol hover:underline tap" href={`/voicings?${new URLSearchParams({ chords: numerals.join(' '), tonic: query.tonic, forms: query.forms.join(',') }).toString()}`}>{name}</Link></li>
          ))}
        </ul>
      </nav>
    </form>
  );
}
