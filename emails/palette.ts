/** The house colours as sRGB hex, because mail programs read no OKLCH; every text pair keeps 4.5:1 in both schemes. */
export const light = {
  film: '#f0f6f6',
  sheet: '#fcfefe',
  line: '#cdd6d7',
  ink: '#162126',
  soft: '#4f5e63',
  teal: '#00474d',
  onTeal: '#fcfefe',
  brass: '#ba9a53',
} as const;

export const dark = {
  film: '#0e1518',
  sheet: '#171f23',
  line: '#343f43',
  ink: '#e2e9eb',
  soft: '#a4b1b4',
  teal: '#83d4d8',
  onTeal: '#0e1518',
  brass: '#ba9a53',
} as const;

/** Faces already on the reader's machine: mail fetches no font. */
export const sans = 'system-ui,-apple-system,Segoe UI,Roboto,Helvetica,Arial,sans-serif';
export const serif = 'Georgia,Iowan Old Style,Times New Roman,serif';

/**
 * The dark scheme and the narrow screen. Styles on the elements themselves are the light scheme on a wide screen, so a
 * program that drops this sheet still shows a whole mail.
 */
export const styleSheet = `
:root { color-scheme: light dark; supported-color-schemes: light dark; }
@media (prefers-color-scheme: dark) {
  .film, .film > table > tbody > tr > td { background-color: ${dark.film} !important; }
  .sheet { background-color: ${dark.sheet} !important; }
  .ink { color: ${dark.ink} !important; border-color: ${dark.ink} !important; }
  .soft { color: ${dark.soft} !important; }
  .line { border-color: ${dark.line} !important; }
  .link { color: ${dark.teal} !important; }
  .action { background-color: ${dark.teal} !important; color: ${dark.onTeal} !important; }
}
@media (max-width: 480px) {
  .film > table > tbody > tr > td { padding: 0 !important; }
  .sheet { border-radius: 0 !important; }
  .margin { padding: 24px 20px !important; }
  .date, .page { display: block !important; width: auto !important; padding-right: 0 !important; }
}
`;
