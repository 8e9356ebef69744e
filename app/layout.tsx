import type { Metadata, Viewport } from 'next';
import { connection } from 'next/server';
import type { ReactNode } from 'react';
import { fontVariables } from './fonts';
import './globals.css';
import { Providers } from './providers';

export const metadata: Metadata = { title: { default: 'Rungwell', template: '%s · Rungwell' }, description: 'One calendar, one ladder, one set of books.', robots: { index: false } };
export const viewport: Viewport = { width: 'device-width', initialScale: 1, themeColor: '#fbf8f1' };

export default async function RootLayout({ children }: { children: ReactNode }) {
  // Every page carries its own nonce, so none is rendered ahead of its request.
  await connection();
  return (
    <html lang="en" className={fontVariables}>
      <body>
        <a href="#content" className="sr-only focus:not-sr-only focus:fixed focus:left-3 focus:top-3 focus:z-50 focus:bg-ink focus:px-4 focus:py-2 focus:text-white">
          Skip to the content
        </a>
        <Providers>{children}</Providers>
      </body>
    </html>
  );
}
