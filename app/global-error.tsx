'use client';

import './globals.css';
import PageError from './error';

export default function GlobalError(props: { error: Error; reset: () => void }) {
  return (
    <html lang="en">
      <body className="min-h-dvh bg-film text-ink">
        <PageError {...props} />
      </body>
    </html>
  );
}
