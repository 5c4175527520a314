import { and, eq, sql } from 'drizzle-orm';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { mailChoices, users } from '../schema';
import { choiceFor, choosableKinds, mayChoose, type MailChoice } from '@/lib/mail/choices';
import { BadInput } from '@/lib/errors';
import type { MailKind } from '@/lib/mail/kinds';
import type { Viewer } from '@/lib/viewer';

export type KindChoice = { kind: MailKind; choice: MailChoice };

/** How each kind that the viewer may choose for comes to them, chosen or usual. */
export async function listChoices(viewer: Viewer): Promise<KindChoice[]> {
  const rows = await db()
    .select({ kind: mailChoices.kind, choice: mailChoices.choice })
    .from(mailChoices)
    .where(eq(mailChoices.userId, viewer.id));
  const chosen = new Map(rows.map(({ kind, choice }) => [kind, choice]));
  return choosableKinds(viewer.role).map((kind) => ({ kind, choice: choiceFor(viewer.role, kind, chosen.get(kind)) }));
}

/** @throws BadInput for a kind that is not the viewer's to choose */
export function saveChoices(viewer: Viewer, choices: KindChoice[]): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'own.settings');
    for (const { kind, choice } of choices) {
      if (!mayChoose(viewer.role, kind)) throw new BadInput({ [kind]: 'This kind of mail always comes.' });
      await tx
        .insert(mailChoices)
        .values({ userId: viewer.id, kind, choice })
        .onConflictDoUpdate({ target: [mailChoices.userId, mailChoices.kind], set: { choice } });
    }
  });
}

/** How a kind of mail comes to somebody. */
export async function findChoice(tx: Tx, userId: string, kind: MailKind): Promise<MailChoice> {
  const own = and(eq(mailChoices.userId, users.id), eq(mailChoices.kind, kind));
  const [row] = await tx
    .select({ role: users.role, choice: sql<MailChoice | null>`${mailChoices.choice}` })
    .from(users)
    .leftJoin(mailChoices, own)
    .where(eq(users.id, userId));
  return row ? choiceFor(row.role, kind, row.choice ?? undefined) : 'at_once';
}
