import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { fontVariables } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Flitchbook', template: '%s · Flitchbook' },
  description: 'The private build diary of a custom guitar shop.',
  robots: { index: false, follow: false },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#172226' },
    { media: '(prefers-color-scheme: dark)', color: '#0b0906' },
  ],
};

/** Every page depends on who asks, and carries a nonce of its own: nothing is rendered ahead of time. */
export const dynamic = 'force-dynamic';

export default function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en" className={fontVariables}>
      <body className="min-h-dvh bg-film text-ink">{children}</body>
    </html>
  );
}
