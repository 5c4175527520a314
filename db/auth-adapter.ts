import type { Adapter, AdapterUser } from 'next-auth/adapters';
import { consumeClaimedLink, findSignInUser, startSession } from './queries/sign-in';
import { findSessionViewer } from './queries/sessions';

type Found = NonNullable<Awaited<ReturnType<typeof findSignInUser>>>;

const asAdapterUser = (user: Found): AdapterUser => ({
  id: user.id,
  email: user.email,
  name: user.name,
  emailVerified: user.verifiedAt === null ? null : new Date(user.verifiedAt),
});

/**
 * What next-auth may do to the database: find invited people, consume a claimed link, start a session. It creates
 * nobody, and it keeps only hashes. `device` and `replacedToken` describe the browser that is signing in.
 */
export function authAdapter({ device, replacedToken }: { device: string; replacedToken: string | null }): Adapter {
  const findUser = async (by: Parameters<typeof findSignInUser>[0]) => {
    const user = await findSignInUser(by);
    return user && asAdapterUser(user);
  };
  return {
    createUser: () => Promise.reject(new Error('people are invited, never created by signing in')),
    getUser: (id) => findUser({ id }),
    getUserByEmail: (email) => findUser({ email }),
    getUserByAccount: () => Promise.resolve(null),
    updateUser: async ({ id }) => {
      const user = await findUser({ id });
      if (!user) throw new Error('no such person');
      return user;
    },
    linkAccount: () => Promise.resolve(undefined),
    useVerificationToken: async ({ identifier, token }) => {
      const nowMs = Date.now();
      const consumed = await consumeClaimedLink(identifier, token, nowMs);
      return consumed ? { identifier, token, expires: new Date(nowMs + 60_000) } : null;
    },
    createVerificationToken: () => Promise.reject(new Error('links are written by askForLink')),
    createSession: async ({ sessionToken, userId }) => {
      const nowMs = Date.now();
      const endsAt = await startSession({ userId, token: sessionToken, replaces: replacedToken, device, nowMs });
      return { sessionToken, userId, expires: new Date(endsAt) };
    },
    getSessionAndUser: async (sessionToken) => {
      const viewer = await findSessionViewer(sessionToken, Date.now());
      const user = viewer && (await findUser({ id: viewer.id }));
      if (!user) return null;
      return { user, session: { sessionToken, userId: user.id, expires: new Date(Date.now() + 60_000) } };
    },
    updateSession: () => Promise.resolve(null),
    deleteSession: () => Promise.resolve(undefined),
  };
}
