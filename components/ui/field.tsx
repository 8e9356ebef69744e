import { useId, type ReactNode } from 'react';

export type FieldIds = { id: string; 'aria-invalid': true | undefined; 'aria-describedby': string | undefined };
type FieldProps = { label: ReactNode; help?: ReactNode; error?: string; optional?: boolean; className?: string; children: (ids: FieldIds) => ReactNode };

export const INPUT = 'w-full min-w-0 rounded border border-rule-strong bg-sheet px-3 py-[9px] text-base text-ink placeholder:text-ink-3 aria-invalid:border-brick disabled:bg-wash tap';

/** Label above, help and then the error below, both read out with the field. */
export function Field({ label, help, error, optional = false, className = '', children }: FieldProps) {
  const id = useId();
  const described = [help ? `${id}-help` : null, error ? `${id}-error` : null].filter((part) => part !== null).join(' ');
  return (
    <div className={`flex flex-col gap-1 ${className}`}>
      <label htmlFor={id} className="text-[14px] font-semibold">
        {label}
        {optional ? <span className="font-normal text-ink-3"> (if you like)</span> : null}
      </label>
      {children({ id, 'aria-invalid': error ? true : undefined, 'aria-describedby': described === '' ? undefined : described })}
      {help ? <p id={`${id}-help`} className="text-small text-ink-3">{help}</p> : null}
      {error ? <p id={`${id}-error`} role="alert" className="text-small font-semibold text-brick">{error}</p> : null}
    </div>
  );
}
