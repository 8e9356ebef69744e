'use client';

import { DateField, RadioGroup, SelectField, TextField } from '@/components/ui/inputs';
import type { ImportChoices } from '@/lib/imports/schema';
import type { ImportDetail } from '@/lib/imports/server/import-screen';

type ChoiceFieldsProps = { detail: ImportDetail; choices: ImportChoices; error: (name: string) => string | undefined; onChange: (part: Partial<ImportChoices>) => void };

const KINDS = [{ value: 'employee', label: 'Employees' }, { value: 'contractor', label: 'Contractors' }];
const NEW_TERM = { name: '', startsOn: '', endsOn: '' };

export function ChoiceFields({ detail: { sites, terms, newTeachers }, choices, error, onChange }: ChoiceFieldsProps) {
  const siteOptions = sites.map(({ id, name }) => ({ value: id, label: name }));
  return (
    <>
      {sites.length > 1 ? <SelectField label="Site" options={siteOptions} value={choices.siteId} onChange={(event) => onChange({ siteId: event.target.value })} error={error('siteId')} /> : null}
      {newTeachers > 0 ? <RadioGroup legend="Its teachers are" name="engagementKind" options={KINDS} checkedValue={choices.engagementKind} onPick={(value) => onChange({ engagementKind: value === 'contractor' ? 'contractor' : 'employee' })} error={error('engagementKind')} /> : null}
      {terms.length > 0 ? <TermSelect terms={terms} choices={choices} onChange={onChange} /> : null}
      {choices.newTerm !== null || terms.length === 0 ? <NewTerm term={choices.newTerm ?? NEW_TERM} error={error} onChange={onChange} /> : null}
      <DateField label="Lay lessons from" optional help="Left empty: from today on. What was taught before stays in the old books." value={choices.lessonsFrom ?? ''} onChange={(event) => onChange({ lessonsFrom: event.target.value || null })} error={error('lessonsFrom')} />
    </>
  );
}

function TermSelect({ terms, choices, onChange }: Pick<ImportDetail, 'terms'> & Pick<ChoiceFieldsProps, 'choices' | 'onChange'>) {
  const options = [...terms.map(({ id, name }) => ({ value: id, label: name })), { value: '', label: 'A new term' }];
  const pick = (termId: string) => onChange(termId === '' ? { termId: null, newTerm: NEW_TERM, lessonsFrom: null } : { termId, newTerm: null, lessonsFrom: null });
  return <SelectField label="Term of the weekly lessons" options={options} value={choices.newTerm ? '' : (choices.termId ?? '')} onChange={(event) => pick(event.target.value)} />;
}

type NewTermProps = { term: NonNullable<ImportChoices['newTerm']> } & Pick<ChoiceFieldsProps, 'error' | 'onChange'>;

function NewTerm({ term, error, onChange }: NewTermProps) {
  return (
    <fieldset className="flex flex-col gap-3 rounded border border-rule p-3">
      <legend className="px-1 text-[14px] font-semibold">The term of the weekly lessons</legend>
      <TextField label="Name" value={term.name} onChange={(event) => onChange({ newTerm: { ...term, name: event.target.value } })} error={error('newTerm.name') ?? error('newTerm')} />
      <DateField label="First day" value={term.startsOn} onChange={(event) => onChange({ newTerm: { ...term, startsOn: event.target.value } })} error={error('newTerm.startsOn')} />
      <DateField label="Last day" value={term.endsOn} onChange={(event) => onChange({ newTerm: { ...term, endsOn: event.target.value } })} error={error('newTerm.endsOn')} />
    </fieldset>
  );
}
