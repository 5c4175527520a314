const browsers = [
  ['Edg/', 'Edge'],
  ['Firefox/', 'Firefox'],
  ['Chrome/', 'Chrome'],
  ['Safari/', 'Safari'],
] as const;

const systems = [
  ['iPhone', 'an iPhone'],
  ['iPad', 'an iPad'],
  ['Android', 'an Android device'],
  ['Windows', 'a Windows computer'],
  ['Mac OS X', 'a Mac'],
  ['Linux', 'a Linux computer'],
] as const;

/** A browser in words that its owner recognises in a list: "Firefox on a Mac". */
export function deviceWords(userAgent: string): string {
  const browser = browsers.find(([mark]) => userAgent.includes(mark))?.[1] ?? 'A browser';
  const system = systems.find(([mark]) => userAgent.includes(mark))?.[1] ?? 'some device';
  return `${browser} on ${system}`;
}
