import { readFileSync, readdirSync } from 'node:fs';

function isOurDecoder(pid: string): boolean {
  try {
    const isDecoder = readFileSync(`/proc/${pid}/cmdline`, 'latin1').includes('lib/photos/decoder.mjs');
    const status = readFileSync(`/proc/${pid}/status`, 'latin1');
    return isDecoder && status.includes(`PPid:\t${process.pid}\n`) && !status.includes('State:\tZ');
  } catch {
    return false;
  }
}

/** Process ids of the decoders this process has alive, as the system lists them. */
export function decoderPids(): number[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && isOurDecoder(name))
    .map(Number);
}
