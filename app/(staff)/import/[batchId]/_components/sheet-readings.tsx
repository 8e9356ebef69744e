'use client';

import { RadioGroup, SelectField, TextField } from '@/components/ui/inputs';
import { COLUMNS, KIND_WORDS, SHEET_KINDS, type SheetKind } from '@/lib/imports/columns';
import type { SheetMapping } from '@/lib/imports/mapping';
import type { SheetReading } from '@/lib/imports/server/import-screen';

type SheetReadingsProps = { readings: readonly SheetReading[]; mapping: readonly SheetMapping[]; onChange: (mapping: SheetMapping[]) => void };

const KIND_OPTIONS = [{ value: '', label: 'Nothing, leave it alone' }, ...SHEET_KINDS.map((kind) => ({ value: kind, label: KIND_WORDS[kind].many }))];
const ORDERS = [{ value: 'day_first', label: 'The day (17/11/2026)' }, { value: 'month_first', label: 'The month (11/17/2026)' }];

/** How each sheet is read: what it is, where its headings stand, which column holds what. Open by itself where something must be said. */
export function SheetReadings({ readings, mapping, onChange }: SheetReadingsProps) {
  const put = (sheet: string, part: Partial<SheetMapping>) => onChange(mapping.map((one) => (one.sheet === sheet ? { ...one, ...part } : one)));
  return (
    <div className="flex flex-col">
      {readings.map((reading) => {
        const { sheet } = reading.mapping;
        const one = mapping.find((wanted) => wanted.sheet === sheet) ?? reading.mapping;
        return <SheetReadingForm key={sheet} reading={reading} one={one} onPut={(part) => put(sheet, part)} />;
      })}
    </div>
  );
}

type SheetReadingFormProps = { reading: SheetReading; one: SheetMapping; onPut: (part: Partial<SheetMapping>) => void };

function SheetReadingForm({ reading: { headings, asksDateOrder, mapping: saved }, one, onPut }: SheetReadingFormProps) {
  const asks = asksDateOrder && one.dateOrder === null;
  const hasSameHeadings = one.kind === saved.kind && one.headingRow === saved.headingRow;
  return (
    <details open={asks || undefined} className="border-t border-rule py-2 last:border-b">
      <summary className="flex items-center justify-between gap-2 py-1 font-semibold tap"><span>{one.sheet}</span><span className="font-normal text-ink-3">{one.kind ? `read as ${KIND_WORDS[one.kind].many.toLowerCase()}` : 'not read'}</span></summary>
      <div className="flex flex-col gap-3 py-2">
        {asksDateOrder ? <RadioGroup legend="What comes first in its dates?" name={`order-${one.sheet}`} options={ORDERS} checkedValue={one.dateOrder} onPick={(value) => onPut({ dateOrder: value === 'month_first' ? 'month_first' : 'day_first' })} error={asks ? 'No date in this column can only be one of the two.' : undefined} /> : null}
        <SelectField label="This sheet holds" options={KIND_OPTIONS} value={one.kind ?? ''} onChange={(event) => onPut({ kind: SHEET_KINDS.find((kind) => kind === event.target.value) ?? null })} />
        <TextField label="Row of the headings" inputMode="numeric" value={one.headingRow} onChange={(event) => onPut({ headingRow: Math.max(1, Number.parseInt(event.target.value, 10) || 1) })} />
        {one.kind && hasSameHeadings ? <ColumnPlaces kind={one.kind} headings={headings} places={one.places} onPlace={(field, place) => onPut({ places: { ...one.places, [field]: place } })} /> : null}
      </div>
    </details>
  );
}

type ColumnPlacesProps = { kind: SheetKind; headings: readonly string[]; places: SheetMapping['places']; onPlace: (field: string, place: number | null) => void };

function ColumnPlaces({ kind, headings, places, onPlace }: ColumnPlacesProps) {
  const options = headings.map((heading, index) => ({ value: String(index), label: heading === '' ? `Column ${index + 1}` : heading }));
  return COLUMNS[kind].map(({ field, label, isNeeded }) => (
    <SelectField key={field} label={label} placeholder={isNeeded ? 'Choose a column' : 'Not in this sheet'} options={options} value={places[field] === null || places[field] === undefined ? '' : String(places[field])}
      error={isNeeded && (places[field] ?? null) === null ? 'This column is needed.' : undefined} onChange={(event) => onPlace(field, event.target.value === '' ? null : Number(event.target.value))} />
  ));
}
