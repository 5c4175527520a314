/** The kinds of work a stage can be: they decide which readings, cautions and checks belong to it. */
export const kindsOfWork = ['wood', 'machining', 'neck', 'body', 'finish', 'buffing', 'setup', 'inspection'] as const;
export type Work = (typeof kindsOfWork)[number];
