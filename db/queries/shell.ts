import { and, eq, isNull, or, sql, type SQL } from 'drizzle-orm';
import { correlated } from '../correlated';
import { prepared } from '../prepared';
import { buildIsVisible, questionIsVisible, signOffIsVisible, type Reader } from '../scope';
import { builds, questions, shop, signOffs } from '../schema';
import { isClientRole, type Role } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';

/** To a builder the questions whose pen they hold, to a rep also those that nobody answers. */
function waitingQuestions(reader: Reader): SQL<number> {
  if (reader.role !== 'builder' && reader.role !== 'rep') return sql<number>`0`;
  const held = eq(questions.penHolderId, reader.id);
  const theirs = reader.role === 'builder' ? held : or(held, isNull(questions.penHolderId));
  const waits = and(eq(questions.state, 'waiting'), theirs, buildIsVisible(reader), questionIsVisible(reader));
  return sql<number>`(select count(*) from ${questions} join ${builds} on ${builds.id} = ${questions.buildId} where ${waits})`;
}

/** To an owner those that wait for their name, to a rep those in which a client wants something changed. */
function waitingSignOffs(reader: Reader): SQL<number> {
  if (reader.role === 'builder' || reader.role === 'admin') return sql<number>`0`;
  const state = eq(signOffs.state, isClientRole(reader.role) ? 'asked' : 'change_asked');
  const waits = and(state, buildIsVisible(reader), signOffIsVisible(reader));
  return sql<number>`(select count(*) from ${signOffs} join ${builds} on ${builds.id} = ${signOffs.buildId} where ${waits})`;
}

function prepareShell(role: Role) {
  const reader = { id: sql.placeholder('viewerId'), role };
  return prepared((on) =>
    on
      .select({
        shopName: shop.name,
        questions: correlated(waitingQuestions(reader)),
        signOffs: correlated(waitingSignOffs(reader)),
      })
      .from(shop)
      .prepare(),
  );
}

const shells = {
  buyer: prepareShell('buyer'),
  artist: prepareShell('artist'),
  builder: prepareShell('builder'),
  rep: prepareShell('rep'),
  admin: prepareShell('admin'),
};

/** What stands over every page of this viewer: the shop's name, and how many questions and sign-offs wait for them. */
export async function findShell({ id, role }: Pick<Viewer, 'id' | 'role'>) {
  return (await shells[role]().get({ viewerId: id })) ?? { shopName: 'The shop', questions: 0, signOffs: 0 };
}
