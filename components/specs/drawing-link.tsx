import { photoHref } from '@/components/photos/photo-image';
import { documentHref } from '@/components/sign-offs/document-subject';
import type { Drawing } from '@/lib/specs/drawings';

/** Where a drawing opens: a photo in its largest size, a PDF as it was sent up. */
const drawingHref = ({ id, photoId }: Drawing) => (photoId === null ? documentHref(id) : photoHref(photoId, 2048));

/** The way to the drawing or sample that says what an item looks like. */
export function DrawingLink({ drawing }: { drawing: Drawing }) {
  return (
    <a
      href={drawingHref(drawing)}
      target="_blank"
      rel="noopener"
      className="inline-flex min-h-11 items-center text-sm font-semibold break-words text-finish-deep hover:underline md:min-h-0"
    >
      <span>
        See “<bdi>{drawing.name}</bdi>”<span className="sr-only"> in a new tab</span>
      </span>
    </a>
  );
}
