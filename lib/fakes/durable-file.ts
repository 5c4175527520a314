import { link, open, rename, rm } from 'node:fs/promises';
import { dirname } from 'node:path';

/** Makes a rename or a link in this folder survive a crash. */
async function syncFolder(path: string): Promise<void> {
  const folder = await open(path, 'r');
  try {
    await folder.sync();
  } finally {
    await folder.close();
  }
}

/** Puts a finished temporary file in place of whatever stands at `path`, in one step. */
export async function replaceFile(temporary: string, path: string): Promise<void> {
  await rename(temporary, path);
  await syncFolder(dirname(path));
}

/** Puts a finished temporary file at `path` unless something stands there; tells whether it did. */
export async function placeNewFile(temporary: string, path: string): Promise<boolean> {
  try {
    await link(temporary, path);
  } catch (error) {
    if (isErrno(error, 'EEXIST')) return false;
    throw error;
  }
  await rm(temporary);
  await syncFolder(dirname(path));
  return true;
}

export function isErrno(error: unknown, code: string): boolean {
  return error instanceof Error && 'code' in error && error.code === code;
}
