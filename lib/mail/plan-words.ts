export type MailPlan = { cadence: 'at_once' | 'daily' | 'weekly' | 'none'; hourLocal: number; weekday: number };

export const weekdays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;

/** "17:00" */
export const hourWords = (hourLocal: number) => `${String(hourLocal).padStart(2, '0')}:00`;

/** A zone's place as people say it: `America/New_York` gives "New York". */
export const placeWords = (zone: string) => zone.split('/').at(-1)?.replaceAll('_', ' ') ?? zone;

/** When somebody's digest comes, as a sentence; staff have no diary in theirs. */
export function mailWords(
  { cadence, hourLocal, weekday }: MailPlan,
  zone: string,
  side: 'client' | 'shop' = 'client',
): string {
  const time = `${hourWords(hourLocal)}, ${placeWords(zone)} time, when there is something new.`;
  if (side === 'shop' && cadence === 'none') return 'No digest.';
  if (side === 'shop' && cadence === 'at_once') return 'A mail at once, whenever there is something.';
  if (cadence === 'none') return 'No diary mail. You read it here.';
  if (cadence === 'at_once') return 'A mail at once, whenever a page is added.';
  return cadence === 'daily' ? `A digest every day at ${time}` : `A digest every ${weekdays[weekday - 1]} at ${time}`;
}
