/** The session cookie that the browser tests' world holds for the person with this address. */
export const tokenFor = (address: string) => `browser-test-session-of-${address}`;

/** The build whose diary holds every hostile document of the collection. */
export const HOSTILE_ORDER = 'Q-2423';
