import { and, eq, isNull, or, sql, type SQL } from 'drizzle-orm';
import { correlated } from '../correlated';
import { preparedByRole } from '../prepared';
import { buildIsVisible, questionIsVisible, signOffIsVisible, type Reader } from '../scope';
import { builds, questions, shop, signOffs } from '../schema';
import { isClientRole } from '@/lib/access';
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

const shellOf = preparedByRole((on, reader) =>
  on
    .select({
      shopName: shop.name,
      questions: correlated(waitingQuestions(reader)),
      signOffs: correlated(waitingSignOffs(reader)),
    })
    .from(shop)
    .prepare(),
);

/** What stands over every page of this viewer: the shop's name, and how many questions and sign-offs wait for them. */
export async function findShell({ id, role }: Pick<Viewer, 'id' | 'role'>) {
  return (await shellOf(role).get({ viewerId: id })) ?? { shopName: 'The shop', questions: 0, signOffs: 0 };
}
