/** What a drawing sent as PDF may be. No Node imports: the ask form reads these in the browser. */
export const PDF_TYPE = 'application/pdf';
export const MAX_PDF_BYTES = 50 * 1024 * 1024;
export const MAX_PDF_PAGES = 200;

/** Everything in a PDF but the contents of its streams: pages and links between them, not what is drawn. */
export const MAX_PDF_FRAME_BYTES = 16 * 1024 * 1024;
/** What all its object streams together may unpack to. */
export const MAX_PDF_UNPACKED_BYTES = 32 * 1024 * 1024;
export const MAX_PDF_STREAMS = 100_000;
export const MAX_PDF_REVISIONS = 200;

/** Drawings that were sent up and not yet put before anybody, for one person. */
export const MAX_UNASKED_DOCUMENTS = 12;
