import { db } from '../client';
import { shop } from '../schema';

/** The shop's name and its time zone, as pages and mails give them; a name that always does before it is set up. */
export async function findShop() {
  const [row] = await db().select({ name: shop.name, timeZone: shop.timeZone }).from(shop);
  return row ?? { name: 'The shop', timeZone: 'UTC' };
}
