import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { DrawingField } from '@/components/specs/edit/drawing-field';
import { EditSurroundings } from '@/components/specs/edit/surroundings';
import { SpecChanges } from '@/components/specs/spec-changes';
import { SpecSubject } from '@/components/sign-offs/spec-subject';
import { PHOTO_COLOUR_SENTENCE } from '@/lib/craft/colour-difference';
import type { Drawing } from '@/lib/specs/drawings';
import { diffSpecs } from '@/lib/specs/diff';
import { lookItem, smallSpec } from '../../support/spec';

const drawing: Drawing = { id: 'd1', name: 'Headstock logo', photoId: null };
const sample: Drawing = { id: 'd2', name: 'Sample 2', photoId: 'p2' };

const fieldHtml = (documentId: string | null, drawings: Drawing[] = [drawing, sample]) =>
  renderToStaticMarkup(
    <EditSurroundings stages={[]} materials={[]} drawings={drawings}>
      <DrawingField item={lookItem({ documentId })} say={() => undefined} />
    </EditSurroundings>,
  );

test('a look is pointed at one of the build’s drawings and samples, or at none', () => {
  const html = fieldHtml(null);
  expect(html).toContain('aria-label="Headstock logo, drawing or sample"');
  expect([...html.matchAll(/<option value="([^"]*)"/g)].map(([, id]) => id)).toEqual(['', 'd1', 'd2']);
  expect(html).not.toContain('<a ');
  expect(fieldHtml(null, [])).toContain('no drawing or sample sent up yet');
});

test('the chosen one can be opened: a PDF as it was sent up, a photo at its largest, which is said to be no measurement', () => {
  expect(fieldHtml('d1')).toContain('href="/api/documents/d1"');
  expect(fieldHtml('d1')).not.toContain(PHOTO_COLOUR_SENTENCE);
  expect(fieldHtml('d2')).toContain('href="/api/photos/p2/2048"');
  expect(fieldHtml('d2')).toContain(PHOTO_COLOUR_SENTENCE);
});

test('what is signed leads to its drawing, and says of one that was not put before the reader that it was not', () => {
  const html = renderToStaticMarkup(
    <SpecSubject
      document={smallSpec(lookItem({ documentId: 'd1' }), lookItem({ key: 'inlay', documentId: 'd9' }))}
      number={2}
      materials={{}}
      drawings={[drawing]}
    />,
  );
  expect(html.match(/href="\/api\/documents\//g)).toHaveLength(1);
  expect(html).toContain('a drawing that was not put before you');
});

test('the difference between two versions names the drawing of an item that is new', () => {
  const words = { show: 'in', materials: {}, stageNames: {}, drawings: [drawing] } as const;
  const changes = diffSpecs(smallSpec(), smallSpec(lookItem({ documentId: 'd1' })), words);
  expect(renderToStaticMarkup(<SpecChanges changes={changes} from="version 1" to="version 2" />)).toContain(
    'Headstock logo</dd>',
  );
});
