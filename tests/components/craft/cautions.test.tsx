import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { Cautions } from '@/components/craft/cautions';
import { caution, cautionsForWork } from '@/lib/craft/cautions';

describe('cautions on a page', () => {
  test('are nothing where there are none', () => expect(renderToStaticMarkup(<Cautions cautions={[]} />)).toBe(''));

  test('one stands open with its whole text', () => {
    const markup = renderToStaticMarkup(<Cautions cautions={[caution('papers')]} />);
    expect(markup).not.toContain('<details');
    expect(markup).toContain(caution('papers').text);
  });

  test('several fold under their names, and none is left out', () => {
    const several = cautionsForWork('finish');
    const markup = renderToStaticMarkup(<Cautions cautions={several} />);
    const [summary = '', list = ''] = markup.split('</summary>');
    expect(summary).toContain('Finish solvents, isocyanates in two-part finishes and spray room');
    for (const { title } of several) expect(list).toContain(title);
  });

  test('carry no style attribute, which the page would refuse', () => {
    expect(renderToStaticMarkup(<Cautions cautions={cautionsForWork('setup')} />)).not.toContain('style=');
  });
});
