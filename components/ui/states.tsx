'use client';

import { useRouter } from 'next/navigation';
import { useTransition, type ReactNode } from 'react';
import { Button } from './button';

/** Nothing here yet, and what to do about it. */
export function EmptyState({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex flex-col items-start gap-2 px-4 py-8 text-left md:items-center md:text-center">
      <p className="font-display text-h2 font-semibold">{title}</p>
      {children ? <div className="max-w-[46ch] text-ink-3">{children}</div> : null}
      {action ? <div className="mt-2">{action}</div> : null}
    </div>
  );
}

/** Something did not load; nothing is lost by trying again. */
export function ErrorState({ message = 'This could not be loaded just now.', onRetry }: { message?: string; onRetry?: () => void }) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  const retry = onRetry ?? (() => startTransition(() => router.refresh()));
  return (
    <div role="alert" className="flex flex-col items-start gap-3 px-4 py-8">
      <p className="text-brick">{message}</p>
      <Button pending={pending} onClick={retry}>Try again</Button>
    </div>
  );
}

/** Grey bars of the size of what is coming. */
export function Skeleton({ className = '' }: { className?: string }) {
  return <div aria-hidden className={`animate-pulse rounded bg-wash ${className}`} />;
}

export function ListSkeleton({ rows = 8, label = 'Loading' }: { rows?: number; label?: string }) {
  return (
    <div role="status" className="flex flex-col gap-3 p-4">
      <span className="sr-only">{label}</span>
      {Array.from({ length: rows }, (_, index) => <Skeleton key={index} className="h-9 w-full" />)}
    </div>
  );
}

export function PageSkeleton() {
  return (
    <div role="status" className="px-4 md:px-7">
      <span className="sr-only">Loading</span>
      <Skeleton className="mt-6 h-8 w-64" />
      <Skeleton className="mt-3 h-4 w-80 max-w-full" />
      <Skeleton className="mt-7 h-[420px] w-full" />
    </div>
  );
}
