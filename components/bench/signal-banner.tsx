'use client';

import Link from 'next/link';
import type { Draft } from './draft-state';
import { NO_SIGNAL } from './post-entry';
import { useOnline } from './use-online';

/** Says above the form what stands in the way of sending, and what happens with the entry meanwhile. */
export function SignalBanner({ draft: { posting }, isKeeping }: { draft: Draft; isKeeping: boolean }) {
  const isOnline = useOnline();
  const isSignedOut = posting.step === 'kept' && posting.isSignedOut;
  const sentence = bannerSentence(posting, isOnline, isKeeping);
  return (
    <div role="status">
      {sentence && (
        <div className="bg-brass-wash">
          <div className="mx-auto max-w-2xl px-4.5 py-3.5 font-medium">
            <p>{sentence}</p>
            {isSignedOut && (
              <Link href="/sign-in" className="-mb-2 inline-flex min-h-12 items-center font-semibold underline">
                Sign in
              </Link>
            )}
          </div>
        </div>
      )}
    </div>
  );
}

function bannerSentence(posting: Draft['posting'], isOnline: boolean, isKeeping: boolean): string | null {
  if (posting.step === 'posted') return null;
  if (!isKeeping) return 'This phone has no room to keep a draft. Leave this page open until the entry is posted.';
  if (posting.step === 'kept') return isOnline ? posting.message : NO_SIGNAL;
  return isOnline ? null : 'No signal. What you write and choose is kept on this phone.';
}
