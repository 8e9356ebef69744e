'use client';

import { useState } from 'react';
import { Checkbox, DateField, MoneyField, RadioGroup, SelectField, TextArea, TextField, TimeField } from '@/components/ui/inputs';
import { FormError } from '@/components/ui/form-error';
import { PersonPicker } from '@/components/ui/person-picker';
import { Sheet } from '@/components/ui/sheet';
import type { PickedPerson } from '@/lib/people/found';

const OPTIONS = [{ value: '30', label: '30 minutes' }, { value: '45', label: '45 minutes' }];
const PAYING = [{ value: 'half', label: 'Half each', help: 'Both payers get an invoice.' }, { value: 'whole', label: 'One pays all' }];

export function Fields({ currencySign }: { currencySign: string }) {
  const [person, setPerson] = useState<PickedPerson | null>(null);
  const [paying, setPaying] = useState('half');
  return (
    <Sheet title="Fields">
      <div className="flex flex-col gap-4">
        <TextField label="Name" help="As it should stand on the invoice." defaultValue="Célia O’Shee" />
        <TextField label="E-mail" type="email" defaultValue="not an address" error="Enter an e-mail address like name@example.org." />
        <TextArea label="Note" optional rows={2} />
        <div className="grid gap-4 sm:grid-cols-2">
          <SelectField label="Length" options={OPTIONS} />
          <SelectField label="Room" placeholder="Choose a room" options={[]} error="Choose a room." />
          <DateField label="Date" defaultValue="2026-11-17" />
          <TimeField label="Start" help="Snaps to five minutes." defaultValue="16:00" />
          <MoneyField label="Amount" currencySign={currencySign} defaultValue="12,50" help="With a comma or a point." />
          <TextField label="Number" defaultValue="2026-0412" disabled />
        </div>
        <PersonPicker label="Student" kind="student" value={person} onPick={setPerson} />
        <RadioGroup legend="Who pays" name="paying" options={PAYING} checkedValue={paying} onPick={setPaying} />
        <Checkbox label="May be photographed" help="Only for the wall of the school." />
        <Checkbox label="The terms are read" error="Tick this to go on." />
        <FormError message="The whole form could not be saved: the month is closed." />
      </div>
    </Sheet>
  );
}
