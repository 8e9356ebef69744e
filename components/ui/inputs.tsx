import { useId, type ComponentProps, type FocusEvent, type ReactNode } from 'react';
import { clockOf, minuteOfClock } from '@/lib/time';
import { Field, INPUT } from './field';

type Labelled = { label: ReactNode; help?: ReactNode; error?: string; optional?: boolean; fieldClass?: string };

export function TextField({ label, help, error, optional, fieldClass, className = '', ...input }: Labelled & ComponentProps<'input'>) {
  return (
    <Field label={label} help={help} error={error} optional={optional} className={fieldClass}>
      {(ids) => <input type="text" {...input} {...ids} className={`${INPUT} ${className}`} />}
    </Field>
  );
}

export function TextArea({ label, help, error, optional, fieldClass, className = '', rows = 4, ...input }: Labelled & ComponentProps<'textarea'>) {
  return (
    <Field label={label} help={help} error={error} optional={optional} className={fieldClass}>
      {(ids) => <textarea rows={rows} {...input} {...ids} className={`${INPUT} resize-y ${className}`} />}
    </Field>
  );
}

export type SelectOption = { value: string; label: string };

export function SelectField({ label, help, error, optional, fieldClass, className = '', options, placeholder, ...input }: Labelled & ComponentProps<'select'> & { options: readonly SelectOption[]; placeholder?: string }) {
  return (
    <Field label={label} help={help} error={error} optional={optional} className={fieldClass}>
      {(ids) => (
        <select {...input} {...ids} className={`${INPUT} ${className}`}>
          {placeholder === undefined ? null : <option value="">{placeholder}</option>}
          {options.map(({ value, label: text }) => <option key={value} value={value}>{text}</option>)}
        </select>
      )}
    </Field>
  );
}

export function DateField(props: Labelled & ComponentProps<'input'>) {
  return <TextField {...props} type="date" />;
}

/** Snaps to five minutes: with the arrows, and on leaving the field whatever was typed. */
export function TimeField({ onBlur, onChange, ...props }: Labelled & ComponentProps<'input'>) {
  const snap = (event: FocusEvent<HTMLInputElement>) => {
    const snapped = toFiveMinutes(event.target.value);
    if (snapped !== null && snapped !== event.target.value) {
      event.target.value = snapped;
      onChange?.(event);
    }
    onBlur?.(event);
  };
  return <TextField {...props} type="time" step={300} onChange={onChange} onBlur={snap} />;
}

const LAST_MINUTE = 23 * 60 + 55;

function toFiveMinutes(typed: string): string | null {
  const minute = minuteOfClock(typed);
  return minute === null ? null : clockOf(Math.min(LAST_MINUTE, Math.round(minute / 5) * 5));
}

/** Accepts "12,50" and "12.50"; the amount is read by the form's own rules, never as a float. */
export function MoneyField({ currencySign, ...props }: Labelled & ComponentProps<'input'> & { currencySign: string }) {
  const { label, help, error, optional, fieldClass, className = '', ...input } = props;
  return (
    <Field label={label} help={help} error={error} optional={optional} className={fieldClass}>
      {(ids) => (
        <span className="relative block">
          <span aria-hidden className="absolute inset-y-0 left-3 flex items-center text-ink-3">{currencySign}</span>
          <input inputMode="decimal" autoComplete="off" {...input} {...ids} className={`${INPUT} num pl-8 ${className}`} />
        </span>
      )}
    </Field>
  );
}

export function Checkbox({ label, help, error, className = '', ...input }: Omit<Labelled, 'optional' | 'fieldClass'> & ComponentProps<'input'>) {
  const id = useId();
  const described = [help ? `${id}-help` : '', error ? `${id}-error` : ''].filter((part) => part !== '').join(' ');
  return (
    <div className={className}>
      <label className="flex items-start gap-3 tap">
        <input type="checkbox" {...input} aria-invalid={error ? true : undefined} aria-describedby={described === '' ? undefined : described} className="mt-[3px] size-[18px] shrink-0 accent-ink" />
        <span>{label}</span>
      </label>
      {help ? <p id={`${id}-help`} className="ml-[30px] text-small text-ink-3">{help}</p> : null}
      {error ? <p id={`${id}-error`} role="alert" className="ml-[30px] text-small font-semibold text-brick">{error}</p> : null}
    </div>
  );
}

type RadioGroupProps = {
  legend: ReactNode; options: readonly (SelectOption & { help?: string })[]; error?: string;
  /** For a form that keeps its own state; a registered field leaves both out. */
  checkedValue?: string | null; onPick?: (value: string) => void;
} & Omit<ComponentProps<'input'>, 'type'>;

export function RadioGroup({ legend, options, error, checkedValue, onPick, ...input }: RadioGroupProps) {
  const id = useId();
  return (
    <fieldset className="flex flex-col gap-1" aria-describedby={error ? `${id}-error` : undefined}>
      <legend className="mb-1 text-[14px] font-semibold">{legend}</legend>
      {options.map(({ value, label, help }) => (
        <label key={value} className="flex items-start gap-3 rounded border border-rule px-3 py-2 has-checked:border-ink has-checked:bg-wash tap">
          <input type="radio" {...input} {...(onPick ? { checked: checkedValue === value, onChange: () => onPick(value) } : {})} value={value} className="mt-[3px] size-[18px] shrink-0 accent-ink" />
          <span>{label}{help ? <span className="block text-small text-ink-3">{help}</span> : null}</span>
        </label>
      ))}
      {error ? <p id={`${id}-error`} role="alert" className="text-small font-semibold text-brick">{error}</p> : null}
    </fieldset>
  );
}
