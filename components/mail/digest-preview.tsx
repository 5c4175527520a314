import type { PreviewedDigest } from '@/lib/jobs/preview-digest';

const photoWords = (count: number) => (count === 1 ? 'One photo comes with it.' : `${count} photos come with it.`);

/** A digest's subject and its words, as a mail program without pictures shows them. */
export function DigestPreview({ subject, text, photoCount }: PreviewedDigest) {
  return (
    <section aria-label="The mail" className="grid max-w-3xl gap-4 border-t-2 border-ink pt-4">
      <h2 className="heading text-xl break-words">{subject}</h2>
      <p dir="auto" className="max-w-prose break-words whitespace-pre-wrap">
        {text}
      </p>
      {photoCount > 0 && <p className="text-sm text-soft">{photoWords(photoCount)}</p>}
    </section>
  );
}
