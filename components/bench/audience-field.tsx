import type { Dispatch } from 'react';
import type { Audience, DraftEvent } from './draft-state';
import { Segmented } from '@/components/ui/segmented';

type AudienceFieldProps = {
  audience: Audience;
  isHeldFirst: boolean;
  error?: string;
  isLocked: boolean;
  dispatch: Dispatch<DraftEvent>;
};

const audiences = [
  { value: 'buyer', label: 'Buyer sees it' },
  { value: 'shop', label: 'Shop only' },
];

export function AudienceField({ audience, isHeldFirst, error, isLocked, dispatch }: AudienceFieldProps) {
  const choose = (value: string) =>
    dispatch({ type: 'audience-chosen', audience: value === 'shop' ? 'shop' : 'buyer' });
  return (
    <fieldset disabled={isLocked} className="grid gap-2 disabled:opacity-60">
      <Segmented
        legend="Who sees it"
        isLegendHidden
        name="audience"
        size="bench"
        options={audiences}
        value={audience}
        onChange={({ target }) => choose(target.value)}
        error={error}
      />
      {isHeldFirst && audience === 'buyer' && <p className="text-soft">A rep releases it before the buyer sees it.</p>}
    </fieldset>
  );
}
