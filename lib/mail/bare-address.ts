const ADDRESS = /^[^\s@<>,;:"()[\]\\]{1,64}@[A-Za-z0-9](?:[A-Za-z0-9.-]{0,252}[A-Za-z0-9])?$/;

/** The address alone, in small letters, of `name@host` or `Name <name@host>`; null when it is not exactly one. */
export function bareAddress(mailbox: string): string | null {
  const [, inner = mailbox.trim()] = /^[^<>\r\n]*<([^<>\r\n]+)>\s*$/.exec(mailbox) ?? [];
  return ADDRESS.test(inner) ? inner.toLowerCase() : null;
}
