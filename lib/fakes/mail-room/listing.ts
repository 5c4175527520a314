import { attachmentSize_bytes, type Attachment } from './attachment';
import type { Mail } from './mailbox';

function describeAttachment(attachment: Attachment) {
  const { filename, contentType, contentId } = attachment;
  return { filename, contentType, contentId, sizeBytes: attachmentSize_bytes(attachment) };
}

/** A mail as `GET /mails` lists it: all of it but the attachments' content. */
export function listedMail(mail: Mail) {
  return { ...mail, attachments: mail.attachments.map(describeAttachment) };
}
