'use server';

import { revalidatePath } from 'next/cache';
import {
  addCheckLine,
  addCheckList,
  changeCheckLine,
  removeCheckLine,
  retireCheckList,
} from '@/db/queries/check-lists';
import { action } from '@/lib/action';
import { changedCheckLine, checkLineRef, checkListRef, newCheckLine, newCheckList } from '@/lib/validation/checks';

const PAGE = '/access/checks';

export const addList = action(newCheckList, async (viewer, list) => {
  await addCheckList(viewer, list);
  revalidatePath(PAGE);
});

export const removeList = action(checkListRef, async (viewer, { listId }) => {
  await retireCheckList(viewer, listId, Date.now());
  revalidatePath(PAGE);
});

export const addLine = action(newCheckLine, async (viewer, line) => {
  await addCheckLine(viewer, line);
  revalidatePath(PAGE);
});

export const changeLine = action(changedCheckLine, async (viewer, line) => {
  await changeCheckLine(viewer, line, Date.now());
  revalidatePath(PAGE);
});

export const removeLine = action(checkLineRef, async (viewer, { lineId }) => {
  await removeCheckLine(viewer, lineId, Date.now());
  revalidatePath(PAGE);
});
