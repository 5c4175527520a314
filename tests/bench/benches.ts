import { asBuiltPdf } from './as-built-pdf';
import { diary } from './diary';
import { diaryJs } from './diary-js';
import { digestKill } from './digest-kill';
import { digestRun } from './digest-run';
import { floor500 } from './floor-500';
import { photoMemory } from './photo-memory';
import { photoPipeline } from './photos';
import { specKeystroke } from './spec-keystroke';
import { search } from './search';
import { windowCoverage } from './window-coverage';
import { windows500 } from './windows-500';
import type { Bench } from './row';

/** In this order; another bench is one more file and one more name here. */
export const benches: Bench[] = [
  diaryJs,
  specKeystroke,
  photoPipeline,
  photoMemory,
  diary,
  floor500,
  windows500,
  windowCoverage,
  asBuiltPdf,
  digestRun,
  digestKill,
  search,
];
