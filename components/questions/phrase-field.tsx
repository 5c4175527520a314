'use client';

import Link from 'next/link';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';

/** A saved phrase as it would stand in this letter; `missing` are fields that nothing is known for. */
export type FilledPhrase = { id: string; title: string; whose: 'mine' | 'shop'; text: string; missing: string[] };

type PhraseFieldProps = { phrases: FilledPhrase[]; isLocked: boolean; onInsert: (text: string) => void };

/** Puts a saved phrase behind what is written so far. */
export function PhraseField({ phrases, isLocked, onInsert }: PhraseFieldProps) {
  const [id, setId] = useState('');
  const chosen = phrases.find((phrase) => phrase.id === id);
  return (
    <div className="flex flex-wrap items-end gap-3">
      <Select
        label="Saved phrase"
        prompt="Choose a phrase"
        options={phrases.map((phrase) => ({
          value: phrase.id,
          label: phrase.whose === 'mine' ? `${phrase.title} (yours)` : phrase.title,
        }))}
        value={id}
        onChange={(event) => setId(event.target.value)}
        disabled={isLocked}
        className="min-w-48 flex-1 sm:max-w-72"
      />
      <Button
        variant="quiet"
        disabled={isLocked || !chosen}
        onClick={() => chosen && onInsert(chosen.text)}
        className="min-h-11"
      >
        Put it in
      </Button>
      <Link
        href="/questions/phrases"
        className="inline-flex min-h-11 items-center text-sm font-semibold text-finish-deep hover:underline"
      >
        Change phrases
      </Link>
      <p role="status" className="basis-full text-sm text-brass-deep empty:hidden">
        {chosen && chosen.missing.length > 0
          ? `Nothing is known for ${chosen.missing.join(' and ')} on this build. Fill it in by hand.`
          : ''}
      </p>
    </div>
  );
}
