'use client';

import { useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';

type Fetching = { state: 'idle' } | { state: 'making' } | { state: 'done' } | { state: 'failed'; message: string };

const FAILED = 'The sheet did not come through. Check the signal and try again.';

async function refusalOf(answer: Response): Promise<string> {
  const body: unknown = await answer.json().catch(() => null);
  const has = typeof body === 'object' && body !== null && 'message' in body && typeof body.message === 'string';
  return has ? String(body.message) : FAILED;
}

/** Fetches the sheet for paper and hands it to the browser; making one with many photos takes some seconds. */
export function DownloadSheet({ href, fileName }: { href: string; fileName: string }) {
  const [fetching, setFetching] = useState<Fetching>({ state: 'idle' });
  const link = useRef<HTMLAnchorElement>(null);

  async function fetchSheet(): Promise<void> {
    setFetching({ state: 'making' });
    try {
      const answer = await fetch(href);
      if (!answer.ok) return setFetching({ state: 'failed', message: await refusalOf(answer) });
      const url = URL.createObjectURL(await answer.blob());
      if (link.current) {
        link.current.href = url;
        link.current.click();
      }
      setTimeout(() => URL.revokeObjectURL(url), 60_000);
      setFetching({ state: 'done' });
    } catch {
      setFetching({ state: 'failed', message: FAILED });
    }
  }

  const isMaking = fetching.state === 'making';
  return (
    <div className="grid justify-items-start gap-3 print:hidden">
      <Button onClick={() => void fetchSheet()} disabled={isMaking} aria-busy={isMaking} size="bench">
        {isMaking ? 'Making the PDF' : 'Download as PDF'}
      </Button>
      <a ref={link} download={fileName} className="hidden" tabIndex={-1} aria-hidden="true">
        {fileName}
      </a>
      <p role="status" className="text-sm text-soft empty:hidden">
        {isMaking && 'Every photo is laid in. This can take a few seconds.'}
        {fetching.state === 'done' && 'It is among your downloads.'}
      </p>
      {fetching.state === 'failed' && (
        <Notice tone="late" role="alert">
          {fetching.message}
        </Notice>
      )}
    </div>
  );
}
