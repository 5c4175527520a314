'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { saveAway } from '@/db/queries/away';
import { saveChoices } from '@/db/queries/mail-choices';
import { saveMailSettings, saveWording } from '@/db/queries/mail-settings';
import { endOtherSessions } from '@/db/queries/sessions';
import { action } from '@/lib/action';
import { awayMoments } from '@/lib/questions/away-days';
import { soundZone } from '@/lib/schedule/digest-times';
import { awayForm } from '@/lib/validation/questions';
import { choicesForm, mailForm, wordingForm } from '@/lib/validation/mail-settings';

export const saveMail = action(mailForm, async (viewer, { zone, ...wish }) => {
  await saveMailSettings(viewer, wish, zone, Date.now());
  revalidatePath('/me');
  return 'Saved.';
});

export const saveKinds = action(choicesForm, async (viewer, choices) => {
  await saveChoices(viewer, choices);
  revalidatePath('/me');
  return 'Saved.';
});

export const saveWords = action(wordingForm, async (viewer, wording) => {
  await saveWording(viewer, wording);
  revalidatePath('/me');
  return 'Saved.';
});

export const leaveOthers = action(z.object({}), async (viewer) => {
  await endOtherSessions(viewer, Date.now());
  revalidatePath('/me');
});

export const keepAway = action(awayForm, async (viewer, days) => {
  await saveAway(viewer, awayMoments(days, soundZone(viewer.timeZone)), Date.now());
  revalidatePath('/me');
  return days.from === '' ? 'Saved: you are here.' : 'Saved. Questions pass you over on these days.';
});
