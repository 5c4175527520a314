const THIS_MACHINE = new Set(['localhost', '127.0.0.1', '[::1]']);

/** An address that may not stand in mail. */
export class UnsafeLink extends Error {
  override name = 'UnsafeLink';
}

/**
 * The normalised form of an address fit for a link in mail: https without user name or password. Plain http is accepted
 * on this machine only, where the program is tried out.
 * @throws UnsafeLink for anything else
 */
export function requireMailLink(url: string): string {
  if (!URL.canParse(url)) throw new UnsafeLink('a link in mail must be a whole address');
  const { protocol, hostname, username, password, href } = new URL(url);
  const isPrivateToLine = protocol === 'https:' || (protocol === 'http:' && THIS_MACHINE.has(hostname));
  if (!isPrivateToLine) throw new UnsafeLink(`a link in mail must be https, not ${protocol}`);
  if (username !== '' || password !== '') throw new UnsafeLink('a link in mail may not carry a user name');
  return href;
}
