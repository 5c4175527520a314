'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';

export function DiscardDraft({ onDiscard }: { onDiscard: () => void }) {
  const [isAsking, setIsAsking] = useState(false);
  return (
    <>
      <button
        type="button"
        onClick={() => setIsAsking(true)}
        className="min-h-12 justify-self-center px-4 font-semibold text-finish-deep underline-offset-4 hover:underline"
      >
        Discard draft
      </button>
      <Dialog
        isOpen={isAsking}
        onClose={() => setIsAsking(false)}
        title="Discard this draft?"
        description="Its words and photos are removed from this phone. What is in the diary already stays there."
        actions={
          <>
            <Button variant="quiet" size="bench" onClick={() => setIsAsking(false)}>
              Keep it
            </Button>
            <Button variant="danger" size="bench" onClick={onDiscard}>
              Discard draft
            </Button>
          </>
        }
      />
    </>
  );
}
