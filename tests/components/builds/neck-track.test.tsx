import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { NeckTrack } from '@/components/builds/neck-track';
import { labelExtent, layoutLabels, NECK_WIDTHS_PX } from '@/components/builds/neck-track-labels';
import { markerCount, neckSummary, type NeckStage } from '@/components/builds/neck-track-stage';
import { NeckNames, NeckStrip } from '@/components/builds/neck-track-strip';

const names = [
  'Lumber',
  'Wood room',
  'Blanks',
  'Machining',
  'Neck & board',
  'Frets',
  'Body & joint',
  'Pre-paint check',
  'Colour & clear',
  'Wet sand & buff',
  'Hardware & set-up',
  'Final check',
];
const dateLabels = { end: 'about 24 Oct' };

/** A build whose stage of now is the given one; past the last, all is done. */
function stagesAt(now: number, stageNames = names): NeckStage[] {
  return stageNames.map((name, index) => ({
    name,
    startedOn: index <= now ? `${index + 1} Jun` : undefined,
    finishedOn: index < now ? `${index + 2} Jun` : undefined,
    state: index < now ? 'done' : index === now ? 'now' : 'ahead',
    noteShort: index === now ? 'coat 4 of 9' : undefined,
  }));
}

const plainText = (markup: string) =>
  markup
    .replace(/<[^>]*>/g, '')
    .replaceAll('&amp;', '&')
    .trim();

/** The items of every ordered list in the markup, list by list, as a screen reader would say them. */
function orderedLists(markup: string): string[][] {
  return [...markup.matchAll(/<ol[^>]*>(.*?)<\/ol>/gs)].map(([, list = '']) =>
    [...list.matchAll(/<li[^>]*>(.*?)<\/li>/gs)].map(([, item = '']) => plainText(item)),
  );
}

describe('the neck to a screen reader', () => {
  const markup = renderToStaticMarkup(<NeckTrack stages={stagesAt(8)} nowShare={0.4} dateLabels={dateLabels} />);

  test('both the lying and the upright neck list every stage in order', () => {
    const lists = orderedLists(markup);
    expect(lists).toHaveLength(2);
    for (const items of lists) {
      expect(items).toHaveLength(names.length);
      items.forEach((item, index) => expect(item.startsWith(`${names[index]},`)).toBe(true));
    }
  });

  test('every stage says whether it is finished, now or ahead', () => {
    const [lying = []] = orderedLists(markup);
    expect(lying[7]).toBe('Pre-paint check, finished, 8 Jun to 9 Jun');
    expect(lying[8]).toBe('Colour & clear, now, since 9 Jun · coat 4 of 9');
    expect(lying[9]).toBe('Wet sand & buff, ahead');
    expect(lying[11]).toBe('Final check, ahead, about 24 Oct');
  });

  test('the stage of now is marked as the current step, once in each list', () => {
    expect(markup.match(/aria-current="step"/g)).toHaveLength(2);
  });

  test('every fret of the lying neck can be reached by key, and nothing that is silent can', () => {
    const [lying = ''] = markup.match(/<ol[^>]*>.*?<\/ol>/s) ?? [];
    expect(lying.match(/tabindex="0"/gi)).toHaveLength(names.length);
    for (const [drawing] of markup.matchAll(/<svg.*?<\/svg>/gs)) expect(drawing).not.toMatch(/tabindex/i);
  });

  test('asked to be compact, only the strip and its upright neck are drawn', () => {
    const compact = renderToStaticMarkup(<NeckTrack stages={stagesAt(8)} nowShare={0.4} compact />);
    expect(orderedLists(compact)).toHaveLength(1);
  });

  test('a build without stages draws nothing', () => {
    expect(renderToStaticMarkup(<NeckTrack stages={[]} nowShare={0} />)).toBe('');
  });
});

describe('a neck in a list of builds', () => {
  test.each([
    { now: -1, summary: 'Not begun' },
    { now: 8, summary: 'Stage 9 of 12, Colour & clear' },
    { now: 12, summary: 'All 12 stages finished' },
  ])('says "$summary"', ({ now, summary }) => {
    expect(neckSummary(stagesAt(now))).toBe(summary);
    const markup = renderToStaticMarkup(<NeckStrip stages={stagesAt(now)} nowShare={0.5} finishHex="#8C1D2B" />);
    expect(markup).toContain(`aria-label="${summary.replaceAll('&', '&amp;')}"`);
    expect(markup).toContain('data-finish="f8c1d2b"');
  });

  test('the names over the necks are read out in order', () => {
    const markup = renderToStaticMarkup(<NeckNames names={['Blanks', 'Frets', 'Final check']} />);
    expect(markup).toContain('aria-label="Stages: Blanks, Frets, Final check"');
  });
});

describe('labels under the neck', () => {
  const longNames = names.map((name) => `${name} and a long second half`);
  const cases = Object.values(NECK_WIDTHS_PX).flatMap((widthPx) =>
    [names, longNames, names.slice(0, 9), names.slice(0, 2), names.slice(0, 1)].flatMap((stageNames) =>
      Array.from({ length: stageNames.length + 1 }, (_, now) => ({
        widthPx,
        stageNames,
        now,
        count: stageNames.length,
      })),
    ),
  );

  test.each(cases)(
    'never overlap or leave the neck: $count stages, now $now, $widthPx px',
    ({ widthPx, stageNames, now }) => {
      const labels = layoutLabels(stagesAt(now, stageNames), dateLabels, widthPx);
      expect(labels.length).toBeGreaterThan(0);
      for (const drawnPx of [widthPx, widthPx * 1.4]) {
        const extents = labels.map((label) => labelExtent(label, drawnPx)).sort((a, b) => a.fromPx - b.fromPx);
        extents.forEach(({ fromPx, toPx }, index) => {
          expect(fromPx).toBeGreaterThanOrEqual(extents[index - 1]?.toPx ?? 0);
          expect(toPx).toBeLessThanOrEqual(drawnPx);
        });
      }
    },
  );

  test.each(Array.from({ length: names.length }, (_, now) => now))(
    'always name the stage of now, here stage %d',
    (now) => {
      for (const widthPx of Object.values(NECK_WIDTHS_PX)) {
        const labels = layoutLabels(stagesAt(now), dateLabels, widthPx);
        expect(labels.find(({ role }) => role === 'now')?.name).toBe(names[now]);
      }
    },
  );

  test('with room, start, last finished, now and end are all named', () => {
    const labels = layoutLabels(stagesAt(8), dateLabels, NECK_WIDTHS_PX.wide);
    expect(labels.map(({ role }) => role).sort()).toEqual(['end', 'lastFinished', 'now', 'start']);
  });
});

describe('position markers', () => {
  test('stand where a neck has them, two at the last stage', () => {
    const counts = names.map((_, index) => markerCount(index + 1, names.length));
    expect(counts).toEqual([0, 0, 1, 0, 1, 0, 1, 0, 1, 0, 0, 2]);
  });

  test('are two at the last stage even where one would stand', () => {
    expect(markerCount(9, 9)).toBe(2);
  });
});
