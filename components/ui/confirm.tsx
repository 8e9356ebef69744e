'use client';

import type { ReactNode } from 'react';
import { Button, type ButtonKind } from './button';
import { Dialog } from './dialog';
import { FormError } from './form-error';

type ConfirmProps = {
  open: boolean; onOpenChange: (open: boolean) => void; title: string;
  /** What will happen: how many, to whom, how much. */
  consequences: readonly ReactNode[];
  confirmLabel: string; kind?: ButtonKind; pending?: boolean; error?: string; onConfirm: () => void; children?: ReactNode;
};

/** Asked once before mail goes out, money moves or a period closes, with the consequences in figures. */
export function ConfirmDialog({ open, onOpenChange, title, consequences, confirmLabel, kind = 'primary', pending = false, error, onConfirm, children }: ConfirmProps) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title={title}>
      <p className="eyebrow mb-2">What will happen</p>
      <ul className="mb-4 flex list-disc flex-col gap-1 pl-5">
        {consequences.map((consequence, index) => <li key={index}>{consequence}</li>)}
      </ul>
      {children}
      <FormError message={error} />
      <div className="mt-4 flex flex-wrap justify-end gap-3">
        <Button onClick={() => onOpenChange(false)}>Leave it</Button>
        <Button kind={kind} pending={pending} onClick={onConfirm}>{confirmLabel}</Button>
      </div>
    </Dialog>
  );
}
