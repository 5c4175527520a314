/**
 * The thread in which sheets are set: setting one takes a second or more, and nobody's page is to wait for it. Plain
 * JavaScript, because a plain node runs it in production.
 */
import { parentPort } from 'node:worker_threads';
import { renderToBuffer } from '@react-pdf/renderer';
import { createElement } from 'react';
import { PaperDocument } from './paper-document.mjs';

/** @param {import('./render-paper').PaperJob} job */
async function set({ plan, pictures, madeAtMs }) {
  const asBuffers = new Map(
    [...pictures].map(([key, bytes]) => [key, Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength)]),
  );
  const props = { plan, pictures: asBuffers, madeAt: new Date(madeAtMs) };
  const document = PaperDocument(props);
  return new Uint8Array(await renderToBuffer(createElement(document.type, document.props)));
}

parentPort?.on('message', async (job) => {
  try {
    const pdf = await set(job);
    parentPort?.postMessage({ ok: true, pdf }, [pdf.buffer]);
  } catch (error) {
    parentPort?.postMessage({
      ok: false,
      problem: error instanceof Error ? (error.stack ?? error.message) : String(error),
    });
  }
});
