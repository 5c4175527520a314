import { FingerboardDrawing } from './fingerboard-drawing';
import { UnitDrawing } from './unit-words';
import { fingerboard } from '@/lib/craft/fingerboard';
import { boardOf, stringPlanOf } from '@/lib/specs/board';
import type { SpecDocument } from '@/lib/specs/document';

/** The fingerboard of a spec to true scale, or what is missing to draw it. */
export function SpecBoard({ document }: { document: SpecDocument }) {
  const plan = boardOf(document);
  const drawn = plan.ok ? fingerboard(plan.value) : plan;
  if (!drawn.ok) return <p className="text-soft">{drawn.message}</p>;
  const strings = stringPlanOf(document);
  const gaugesThou = strings.ok ? strings.value.strings.map(({ gauge }) => gauge.gaugeThou) : undefined;
  return (
    <UnitDrawing
      inches={<FingerboardDrawing board={drawn.board} unit="in" gaugesThou={gaugesThou} />}
      mm={<FingerboardDrawing board={drawn.board} unit="mm" gaugesThou={gaugesThou} />}
    />
  );
}
