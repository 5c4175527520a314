/** The session cookie that the browser tests' world holds for the person with this address. */
export const tokenFor = (address: string) => `browser-test-session-of-${address}`;
