import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { BenchHeader } from '@/components/bench/bench-header';
import { EditForm } from '@/components/bench/edit-form';
import { FinishStyle } from '@/components/builds/finish-style';
import { requireEditableEntry } from '@/db/queries/entries';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { pageNonce } from '@/lib/request';

export const metadata: Metadata = { title: 'Edit an entry' };

export default async function EditPage({ params }: PageProps<'/bench/[orderNumber]/entries/[entryId]'>) {
  const viewer = await pageViewer();
  const { orderNumber, entryId } = await params;
  const entry = await orNotFound(requireEditableEntry(viewer, entryId));
  if (entry.orderNumber !== orderNumber) notFound();
  const author = entry.authorId === viewer.id ? 'Your entry' : `Entry of ${entry.authorName}`;
  return (
    <>
      <FinishStyle finishHex={entry.finishHex} nonce={await pageNonce()} />
      <BenchHeader orderNumber={entry.orderNumber} instrument={entry.instrument}>
        {author}, {entry.stageName}
      </BenchHeader>
      <EditForm orderNumber={entry.orderNumber} entryId={entry.id} revision={entry.revision} body={entry.body} />
    </>
  );
}
