'use client';

import './globals.css';
import { Fault } from '@/components/shell/fault';

export default function GlobalError(props: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <html lang="en">
      <body><Fault {...props} /></body>
    </html>
  );
}
