'use client';

import { useState } from 'react';
import { Select } from '@/components/ui/select';
import { gaugeWords, type Gauge } from '@/lib/craft/gauges';
import { noteWords } from '@/lib/craft/notes';
import { changeString, changeWords, type BalancedString } from '@/lib/craft/string-balance';
import { listedGauges, type Construction } from '@/lib/craft/string-weights';
import type { StringPlan } from '@/lib/craft/strings';

type StringTrialProps = { plan: StringPlan; strings: BalancedString[] };
type Choice = { number: number; gauge: string };

const constructions: Construction[] = ['plain', 'wound'];
const valueOf = (gaugeThou: number, construction: Construction) => `${construction} ${gaugeThou}`;

const gauges = constructions.flatMap((construction) =>
  listedGauges(construction).map((gaugeThou) => ({ gaugeThou, construction, isAssumed: false })),
);
const gaugeOptions = gauges.map(({ gaugeThou, construction }) => ({
  value: valueOf(gaugeThou, construction),
  label: `${gaugeWords(gaugeThou)} ${construction}`,
}));

/** The first string that lies outside the band with the gauge that would bring it in; else the first as it is. */
function startOf(strings: BalancedString[]): Choice {
  const outside = strings.find(({ advice }) => advice !== null);
  if (!outside?.advice) return { number: 1, gauge: '' };
  return { number: outside.number, gauge: valueOf(outside.advice.gaugeThou, outside.gauge.construction) };
}

/** What another gauge on one string does to it and to the set. Nothing of it is kept. */
export function StringTrial({ plan, strings }: StringTrialProps) {
  const [chosen, setChosen] = useState<Choice | null>(null);
  const { number, gauge } = chosen && chosen.number <= strings.length ? chosen : startOf(strings);
  return (
    <fieldset className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <legend className="mb-2 font-semibold">Try another gauge</legend>
      <div className="grid grid-cols-2 gap-3">
        <Select
          label="String"
          options={strings.map((string) => ({
            value: String(string.number),
            label: `${noteWords(string.note)}, ${gaugeWords(string.gauge.gaugeThou)}`,
          }))}
          value={String(number)}
          onChange={({ target }) => setChosen({ number: Number(target.value), gauge: '' })}
        />
        <Select
          label="Gauge"
          prompt="as in the spec"
          options={gaugeOptions}
          value={gauge}
          onChange={({ target }) => setChosen({ number, gauge: target.value })}
        />
      </div>
      <p aria-live="polite" className="text-sm text-soft">
        {trialWords(
          plan,
          number,
          gauges.find((one) => valueOf(one.gaugeThou, one.construction) === gauge),
        )}
      </p>
    </fieldset>
  );
}

function trialWords(plan: StringPlan, number: number, gauge: Gauge | undefined): string {
  if (!gauge) return 'Choose a gauge to see what it does.';
  const changed = changeString(plan, number, gauge);
  return changed.ok ? `${changeWords(changed)} The spec stays as it is.` : changed.message;
}
