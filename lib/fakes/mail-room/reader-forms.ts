import { escapeMarkup } from '../markup';
import type { Mail } from './mailbox';

function replyForm({ id, to, replyTo }: Mail): string {
  if (replyTo.length === 0) return '';
  return `<h2 id="reply">Answer it</h2>
<form method="post" action="/mail/${id}/reply" enctype="multipart/form-data">
<label>From <input name="from" value="${escapeMarkup(to[0] ?? '')}" required></label>
<label>Your answer <textarea name="text" rows="6"></textarea></label>
<label>A photo <input type="file" name="photo" accept="image/*"></label>
<label><input type="checkbox" name="automatic" value="yes"> Say that a machine wrote it, as an out-of-office answer does</label>
<button>Send the answer</button>
</form>`;
}

const FATES = [
  ['delivered', 'It arrived'],
  ['bounced', 'It came back'],
  ['complained', 'It was called unwanted'],
] as const;

function fateForm({ id }: Mail): string {
  const buttons = FATES.map(([value, label]) => `<button name="happened" value="${value}">${label}</button>`);
  return `<h2 id="fate">What became of it</h2>
<form method="post" action="/mail/${id}/events" enctype="multipart/form-data"><p>${buttons.join(' ')}</p></form>`;
}

/** What a reader can do with a mail, where somebody listens. */
export const readerForms = (mail: Mail) => `${replyForm(mail)}\n${fateForm(mail)}`;
