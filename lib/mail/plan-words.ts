export type MailPlan = { cadence: 'at_once' | 'daily' | 'weekly' | 'none'; hourLocal: number; weekday: number };

export const weekdays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;

/** "17:00" */
export const hourWords = (hourLocal: number) => `${String(hourLocal).padStart(2, '0')}:00`;

/** A zone's place as people say it: `America/New_York` gives "New York". */
export const placeWords = (zone: string) => zone.split('/').at(-1)?.replaceAll('_', ' ') ?? zone;

/** When somebody's diary mail comes, as a sentence. */
export function mailWords({ cadence, hourLocal, weekday }: MailPlan, zone: string): string {
  const time = `${hourWords(hourLocal)}, ${placeWords(zone)} time, when there is something new.`;
  if (cadence === 'none') return 'No diary mail. You read it here.';
  if (cadence === 'at_once') return 'A mail at once, whenever a page is added.';
  return cadence === 'daily' ? `A digest every day at ${time}` : `A digest every ${weekdays[weekday - 1]} at ${time}`;
}
