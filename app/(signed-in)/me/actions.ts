'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { saveMailSettings, saveTimeZone } from '@/db/queries/mail-settings';
import { endOtherSessions } from '@/db/queries/sessions';
import { action } from '@/lib/action';
import { mailForm, zoneForm } from '@/lib/validation/mail-settings';

export const saveMail = action(mailForm, async (viewer, { zone, ...wish }) => {
  await saveMailSettings(viewer, wish, zone, Date.now());
  revalidatePath('/me');
  return 'Saved.';
});

export const saveZone = action(zoneForm, async (viewer, { zone }) => {
  await saveTimeZone(viewer, zone, Date.now());
  revalidatePath('/me');
  return 'Saved.';
});

export const leaveOthers = action(z.object({}), async (viewer) => {
  await endOtherSessions(viewer, Date.now());
  revalidatePath('/me');
});
