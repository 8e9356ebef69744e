'use client';

import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { install } from '../actions';

export function InstallButton() {
  const [problem, setProblem] = useState<string>();
  const [isPending, startTransition] = useTransition();
  const press = () => startTransition(async () => {
    const result = await install({}).catch(() => null);
    setProblem(result?.ok ? undefined : (result?.message ?? 'This did not reach the school. Press again.'));
  });
  return (
    <div className="grid gap-2">
      <Button kind="primary" pending={isPending} onClick={press}>Install the first edition</Button>
      <FormError message={problem} />
    </div>
  );
}
