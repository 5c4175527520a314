import { MAX_PDF_BYTES, MAX_PDF_PAGES } from './limits';

export const PDF_REFUSAL_CODES = [
  'empty',
  'too_large',
  'not_a_pdf',
  'truncated',
  'broken',
  'more_behind',
  'locked',
  'active',
  'no_pages',
  'too_many_pages',
  'too_much_work',
  'altered',
] as const;
export type PdfRefusalCode = (typeof PDF_REFUSAL_CODES)[number];

/** What the person who chose the file reads: what is wrong with it and what to do. */
export const PDF_REFUSALS: Record<PdfRefusalCode, string> = {
  empty: 'This file is empty. Choose the drawing again.',
  too_large: `This PDF is over ${MAX_PDF_BYTES / 1024 / 1024} MB. Save a smaller copy and choose that.`,
  not_a_pdf: 'This file is not a PDF, whatever its name says. Save the drawing as PDF and choose that.',
  truncated: 'Part of this PDF is missing. Check that it opens whole here, then choose it again.',
  broken: 'This PDF is damaged inside. Save it anew from the program that drew it and choose that.',
  more_behind: 'Something else hangs on the end of this PDF. Print it to a plain PDF and choose that.',
  locked: 'This PDF is locked with a password. Save a copy without one and choose that.',
  active: 'This PDF carries a program or another file inside it. Print it to a plain PDF and choose that.',
  no_pages: 'This PDF has no page to look at. Save the drawing anew and choose that.',
  too_many_pages: `This PDF has more than ${MAX_PDF_PAGES} pages. Send only those to be signed.`,
  too_much_work: 'This PDF takes too much work to open. Print it to a plain PDF and choose that.',
  altered: 'What arrived is not the file that was chosen. Choose it again and send it once more.',
};
