import { photoHref } from '@/components/photos/photo-image';
import { LinkButton } from '@/components/ui/button';
import type { SubjectOfSignOff } from '@/db/queries/sign-off-subjects';
import { sizeWords } from '@/lib/documents/size-words';

type Document = NonNullable<SubjectOfSignOff['document']>;

export const documentHref = (id: string) => `/api/documents/${id}`;

/** The photo, large; or the way to open the PDF. */
export function DocumentSubject({ document, title }: { document: Document; title: string }) {
  if (document.photoId !== null) return <LargePhoto photoId={document.photoId} document={document} title={title} />;
  return (
    <div className="flex max-w-2xl flex-wrap items-center gap-5 rounded border border-line bg-sheet p-5">
      <SheetMark />
      <div className="min-w-0 flex-1">
        <p className="font-semibold break-words">
          <bdi>{document.title}</bdi>
        </p>
        <p className="text-sm text-soft">PDF{document.sizeBytes !== null && `, ${sizeWords(document.sizeBytes)}`}</p>
      </div>
      <LinkButton href={documentHref(document.id)} target="_blank" rel="noopener" prefetch={false}>
        Open the drawing
      </LinkButton>
    </div>
  );
}

function LargePhoto({ photoId, document, title }: { photoId: string; document: Document; title: string }) {
  return (
    <figure className="grid gap-2">
      <a href={photoHref(photoId, 2048)} target="_blank" rel="noopener" className="block bg-tint">
        <img
          src={photoHref(photoId, 1280)}
          srcSet={`${photoHref(photoId, 640)} 640w, ${photoHref(photoId, 1280)} 1280w, ${photoHref(photoId, 2048)} 2048w`}
          sizes="(min-width: 64rem) 52rem, 100vw"
          width={document.widthPx ?? undefined}
          height={document.heightPx ?? undefined}
          alt={title}
          className="block h-auto w-full"
        />
      </a>
      <figcaption className="text-sm text-soft">
        Press the picture to see it larger. A screen shows colour only roughly: for a colour, look at the sample itself.
      </figcaption>
    </figure>
  );
}

/** A drawing sheet with its corner turned. */
function SheetMark() {
  return (
    <svg viewBox="0 0 40 52" width="40" height="52" aria-hidden="true" focusable="false" className="shrink-0">
      <path d="M2 2h25l11 11v37H2z" className="fill-tint stroke-finish-deep" strokeWidth="2" strokeLinejoin="round" />
      <path d="M27 2v11h11" className="fill-none stroke-finish-deep" strokeWidth="2" strokeLinejoin="round" />
      <path
        d="M9 40c6-14 8 2 12-8s6-6 10-10"
        className="fill-none stroke-finish"
        strokeWidth="2"
        strokeLinecap="round"
      />
    </svg>
  );
}
