import { useState } from 'react';
import { useMinute } from './use-minute';
import { Select } from '@/components/ui/select';
import {
  coatMaterials,
  materialOf,
  PLACEHOLDER_SENTENCE,
  spanWords,
  windowsOf,
  windowState,
  type FinishWindow,
} from '@/lib/craft/finish-windows';

type FinishWindowsProps = { product: string; lastCoatAtMs: number | null };

const options = coatMaterials.map((material) => ({ value: material, label: material }));

/** When the next coat, or sanding and buffing, may follow the last coat of the diary. */
export function FinishWindows({ product, lastCoatAtMs }: FinishWindowsProps) {
  const [chosen, setChosen] = useState<string | null>(null);
  const nowMs = useMinute();
  const material = chosen ?? materialOf(product) ?? coatMaterials[0] ?? '';
  const windows = windowsOf(material);
  return (
    <details>
      <summary className="flex min-h-11 cursor-pointer items-center font-semibold text-finish-deep">
        How long to wait after a coat
      </summary>
      <div className="grid gap-3 pt-2">
        <Select
          label="What was put on is"
          controlSize="bench"
          options={options}
          value={material}
          onChange={({ target }) => setChosen(target.value)}
        />
        <dl className="grid gap-2">
          {windows.map((window) => (
            <div key={window.step}>
              <dt className="text-sm text-soft first-letter:uppercase">{window.step}</dt>
              <dd>{windowWords(window, lastCoatAtMs, nowMs)}</dd>
            </div>
          ))}
        </dl>
        {lastCoatAtMs === null && (
          <p className="text-sm text-soft">They count from the last coat; none stands in the diary yet.</p>
        )}
        {windows.some(({ isPlaceholder }) => isPlaceholder) && (
          <p className="text-sm font-semibold text-brass-deep">{PLACEHOLDER_SENTENCE}</p>
        )}
      </div>
    </details>
  );
}

function windowWords(window: FinishWindow, lastCoatAtMs: number | null, nowMs: number | null): string {
  const state = lastCoatAtMs === null || nowMs === null ? null : windowState(window, lastCoatAtMs, nowMs);
  return [`${spanWords(window)}.`, state?.words].filter(Boolean).join(' ');
}
