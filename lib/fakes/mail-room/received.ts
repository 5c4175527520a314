import { randomUUID } from 'node:crypto';
import { jsonAnswer, type Answer } from './answer';
import { Refusal } from './refusal';

export interface ReceivedFile {
  id: string;
  filename: string;
  contentType: string;
  bytes: Buffer;
}

export interface Received {
  id: string;
  from: string;
  to: string[];
  subject: string;
  text: string;
  headers: Record<string, string>;
  messageId: string;
  createdAt: string;
  files: ReceivedFile[];
}

/** Mails that came in, as long as the room runs. */
export interface ReceivedMails {
  add(mail: Omit<Received, 'id' | 'messageId'>): Received;
  /** Answers `GET /emails/receiving/...` as the service does. @throws Refusal when there is no such mail or file */
  describe(path: string, origin: string): Answer;
  /** The bytes behind the link that `describe` gives for a file. */
  file(path: string): Answer;
}

const describeFile = ({ id, filename, contentType, bytes }: ReceivedFile) => ({
  id,
  filename,
  size: bytes.length,
  content_type: contentType,
  content_id: null,
  content_disposition: 'attachment',
});

function describeMail({ id, from, to, subject, text, headers, messageId, createdAt, files }: Received) {
  const nobody = { cc: null, bcc: null, reply_to: null };
  const content = { subject, text, html: null, headers, message_id: messageId, attachments: files.map(describeFile) };
  return { object: 'email', id, from, to, ...nobody, received_for: to, created_at: createdAt, ...content };
}

export function createReceivedMails(): ReceivedMails {
  const kept = new Map<string, Received>();
  const find = (mailId: string, fileId?: string) => {
    const mail = kept.get(mailId);
    const file = mail?.files.find(({ id }) => id === fileId);
    if (!mail || (fileId !== undefined && !file)) throw new Refusal('not_found', 'No such mail came in.');
    return { mail, file };
  };
  return {
    add: (mail) => {
      const id = randomUUID();
      const received = { ...mail, id, messageId: `<${id}@reader.example>` };
      kept.set(id, received);
      return received;
    },
    describe: (path, origin) => {
      const [, , , mailId = '', , fileId] = path.split('/');
      const { mail, file } = find(mailId, fileId);
      if (!file) return jsonAnswer(200, describeMail(mail));
      const expires = new Date(Date.now() + 3_600_000).toISOString();
      const link = { download_url: `${origin}/received/${mailId}/${file.id}`, expires_at: expires };
      return jsonAnswer(200, { object: 'attachment', ...describeFile(file), ...link });
    },
    file: (path) => {
      const [, , mailId = '', fileId = ''] = path.split('/');
      const { file } = find(mailId, fileId);
      return { status: 200, headers: { 'content-type': 'application/octet-stream' }, body: file?.bytes ?? '' };
    },
  };
}
