'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { Toaster } from 'sonner';

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { staleTime: 15_000, retry: 1, refetchOnWindowFocus: true } } }));
  return (
    <QueryClientProvider client={client}>
      {children}
      <Toaster position="bottom-center" toastOptions={{ className: '!rounded !border-rule !bg-sheet !text-ink !font-sans !shadow-md', duration: 6000 }} />
    </QueryClientProvider>
  );
}
