import { pino } from 'pino';

/** Never addresses, tokens, subjects or texts: ids and causes only. */
export const log = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  base: undefined,
  redact: ['*.token', '*.email', '*.authorization', '*.cookie'],
});

/** A fault of ours, with its chain of causes. Query parameters stay out: they can hold what people wrote. */
export function logFault(error: unknown, context: Record<string, string> = {}): void {
  const causes: string[] = [];
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    causes.push(`${cause.name}: ${'query' in cause ? 'database query failed' : cause.message}`);
  }
  const stack =
    error instanceof Error
      ? error.stack
          ?.split('\n')
          .filter((line) => line.includes(' at '))
          .slice(0, 12)
      : undefined;
  log.error({ ...context, causes, stack }, 'fault');
}
