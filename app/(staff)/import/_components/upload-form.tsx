'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { Field, INPUT } from '@/components/ui/field';
import { Sheet } from '@/components/ui/sheet';
import { COLUMNS, KIND_WORDS, SHEET_KINDS } from '@/lib/imports/columns';
import { chooseWorkbook } from '../actions';

export function UploadForm() {
  const router = useRouter();
  const [file, setFile] = useState<File | null>(null);
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const send = () => startTransition(async () => {
    if (!file) return setError('Choose a workbook first.');
    const result = await chooseWorkbook({ file }).catch(() => null);
    if (result?.ok) return router.push(`/import/${result.data.batchId}`);
    setError(result?.message ?? 'This did not reach the school. Check your connection and press again.');
  });
  return (
    <Sheet eyebrow="Choose a workbook">
      <form onSubmit={(event) => { event.preventDefault(); send(); }} className="flex flex-col gap-4">
        <Field label="Workbook" help="An .xlsx file of at most 5 MB." error={error}>
          {(ids) => <input type="file" accept=".xlsx" {...ids} onChange={(event) => { setFile(event.target.files?.[0] ?? null); setError(undefined); }} className={`${INPUT} file:mr-3 file:rounded file:border-0 file:bg-wash file:px-3 file:py-1 file:font-semibold`} />}
        </Field>
        <Button type="submit" kind="primary" pending={pending}>Read it</Button>
      </form>
      <h3 className="mb-1 mt-5 text-h3">What it may hold</h3>
      <ul className="flex flex-col gap-2 text-small text-ink-2">
        {SHEET_KINDS.map((kind) => <li key={kind}><span className="font-semibold text-ink">{KIND_WORDS[kind].many}</span>: {COLUMNS[kind].map(({ label }) => label).join(', ')}</li>)}
      </ul>
      <p className="mt-3 text-small text-ink-3">Other sheets and columns are left alone. The order does not matter, and headings may be worded a little differently.</p>
    </Sheet>
  );
}
