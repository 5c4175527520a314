/**
 * The child process in which strangers' pictures are opened. It has no database, no secrets and no network of its own, and
 * its parent may end it at any moment. Plain JavaScript, because a plain node runs it in production.
 */
import { createHash } from 'node:crypto';
import sharp from 'sharp';
import { convertPhoto } from './convert.mjs';
import { inspectPhoto } from './inspect.mjs';

sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({
  operation: ['VipsForeignLoadJpegBuffer', 'VipsForeignLoadPngBuffer', 'VipsForeignLoadWebpBuffer'],
});
sharp.cache(false);
sharp.concurrency(1);

/** @typedef {import('./decoder-run').DecoderJob} DecoderJob */

/** @param {DecoderJob} job */
function isAsPromised({ bytes, sizeBytes, sha256Hex }) {
  if (bytes.length !== sizeBytes) return false;
  return sha256Hex === undefined || createHash('sha256').update(bytes).digest('hex') === sha256Hex.toLowerCase();
}

/**
 * @param {DecoderJob} job
 * @returns {Promise<import('./decoder-reply').DecoderReply>}
 */
async function decode(job) {
  if (!isAsPromised(job)) return { ok: false, code: 'altered', detail: 'length or SHA-256 differs from the promise' };
  const verdict = inspectPhoto(job.bytes, job.contentType, job.limits);
  if (!verdict.ok) return verdict;
  try {
    return { ok: true, ...(await convertPhoto(verdict.picture, job.limits)) };
  } catch (error) {
    const detail = String(error);
    return { ok: false, code: /premature end/i.test(detail) ? 'truncated' : 'failed', detail };
  }
}

process.on('message', async (/** @type {DecoderJob} */ job) => {
  process.send?.(await decode(job));
});

// An ordinary exit would wait for the decode in progress, and that can be the very thing that never ends.
process.on('disconnect', () => process.kill(process.pid, 'SIGKILL'));
