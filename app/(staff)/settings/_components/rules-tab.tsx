'use client';

import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { DateField, SelectField, TextField } from '@/components/ui/inputs';
import type { HouseRuleRow } from '@/db/settings';
import { formatDate } from '@/lib/format';
import { HOUSE_RULES, PLAIN_RULE_KEYS, type HouseRules, type PlainRuleKey } from '@/lib/house-rules';
import type { LocalDate } from '@/lib/time';
import { saveRule } from '../actions';
import { CHOICES, ruleWords } from './rule-words';

type RulesTabProps = { rules: HouseRules; history: readonly HouseRuleRow[]; locale: string; today: LocalDate };

export function RulesTab({ rules, history, locale, today }: RulesTabProps) {
  const [changing, setChanging] = useState<PlainRuleKey | null>(null);
  return (
    <>
      <ul className="sheet">
        {PLAIN_RULE_KEYS.map((key) => {
          const planned = history.filter((row) => row.key === key);
          return (
            <li key={key} className="flex flex-wrap items-center justify-between gap-3 border-b border-rule px-4 py-3 last:border-b-0">
              <div>
                <p>{HOUSE_RULES[key].label}: <b>{ruleWords(key, rules[key])}</b></p>
                <p className="text-small text-ink-3">
                  {planned.length === 0 ? 'As the product begins with; common practice.' : planned.map(({ value, validFrom, approvedByName }) => `${ruleWords(key, value)} from ${formatDate(validFrom, locale, 'full')}${approvedByName ? ` (${approvedByName})` : ''}`).join('; ')}
                </p>
              </div>
              <Button onClick={() => setChanging(key)}>Change</Button>
            </li>
          );
        })}
      </ul>
      {changing ? <ChangeRule ruleKey={changing} value={rules[changing]} today={today} onClose={() => setChanging(null)} /> : null}
    </>
  );
}

function ChangeRule({ ruleKey, value, today, onClose }: { ruleKey: PlainRuleKey; value: number | string; today: LocalDate; onClose: () => void }) {
  const [typed, setTyped] = useState(String(value));
  const [validFrom, setValidFrom] = useState(today);
  const [message, setMessage] = useState<string>();
  const [pending, startTransition] = useTransition();
  const choices = CHOICES[ruleKey];
  const save = () => startTransition(async () => {
    const result = await saveRule({ key: ruleKey, value: choices ? typed : Number(typed.replace(',', '.')), validFrom }).catch(() => null);
    if (!result?.ok) return setMessage(result?.fields.value?.[0] ?? result?.fields.validFrom?.[0] ?? result?.message ?? 'This did not reach the school. Press again.');
    toast.success('The rule is changed.');
    onClose();
  });
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} title={HOUSE_RULES[ruleKey].label} description="What happened before the first day is judged by the rule of its own day.">
      <form onSubmit={(event) => { event.preventDefault(); save(); }} className="flex flex-col gap-4">
        {choices ? <SelectField label="Rule" options={choices} value={typed} onChange={(event) => setTyped(event.target.value)} /> : <TextField label={ruleKey.endsWith('_minor') ? 'Amount in cents' : 'Value'} inputMode="numeric" value={typed} onChange={(event) => setTyped(event.target.value)} />}
        <DateField label="From" value={validFrom} onChange={(event) => setValidFrom(event.target.value)} />
        <FormError message={message} />
        <Button type="submit" kind="primary" pending={pending}>Change the rule</Button>
      </form>
    </Dialog>
  );
}
