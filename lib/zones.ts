import { isZone } from '@/lib/schedule/digest-times';

export type ZoneGroup = { area: string; places: { value: string; label: string }[] };

/** `America/Indiana/Knox` gives the area "America" and the place "Knox, Indiana". */
function splitZone(zone: string): { area: string; place: string } {
  const [area = zone, ...rest] = zone.replaceAll('_', ' ').split('/');
  return { area, place: rest.reverse().join(', ') || area };
}

/** Every zone somebody may choose, by area, with `chosen` among them even where this machine knows it by another name. */
export function listZones(chosen: string): ZoneGroup[] {
  const zones = new Set([...Intl.supportedValuesOf('timeZone').filter(isZone), 'UTC', chosen]);
  const groups = new Map<string, ZoneGroup>();
  for (const zone of [...zones].sort()) {
    const { area, place } = splitZone(zone);
    const group = groups.get(area) ?? { area, places: [] };
    group.places.push({ value: zone, label: place });
    groups.set(area, group);
  }
  return [...groups.values()];
}
