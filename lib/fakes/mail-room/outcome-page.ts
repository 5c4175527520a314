import type { Answer } from './answer';
import type { Mail } from './mailbox';
import { foreign, pageAnswer } from './page';

function words(status: number): string {
  if (status === 200) return 'The shop has been told, and has taken it. What came of it stands in the diary.';
  if (status === 0) return 'The shop did not answer. Is it running?';
  return `The shop answered with ${status}, so it has not taken it.`;
}

/** What became of an answer or an event; the status is the shop's. */
export function outcomePage({ id, subject }: Mail, status: number): Answer {
  return pageAnswer(
    status === 200 ? 200 : 502,
    'Sent · Mail room',
    `<nav aria-label="Mail room"><a href="/">All addresses</a><a href="/mail/${id}">Back to the mail</a></nav>
<main><h1>${foreign(subject)}</h1><p role="status">${words(status)}</p></main>`,
  );
}
