import localFont from 'next/font/local';

// Letters beyond western European names live in files of their own, fetched only when a page shows one. Their families stand first in
// the stack (see globals.css), or the fallback face of the main family would answer for them.

const archivo = localFont({
  variable: '--font-archivo',
  src: '../node_modules/@fontsource-variable/archivo/files/archivo-latin-wdth-normal.woff2',
  weight: '100 900',
  declarations: [{ prop: 'font-stretch', value: '62% 125%' }],
});

const archivoExtended = localFont({
  variable: '--font-archivo-extended',
  src: '../node_modules/@fontsource-variable/archivo/files/archivo-latin-ext-wdth-normal.woff2',
  weight: '100 900',
  declarations: [
    { prop: 'font-stretch', value: '62% 125%' },
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+0304,U+0308,U+0329,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF',
    },
  ],
  preload: false,
  adjustFontFallback: false,
});

const literata = localFont({
  variable: '--font-literata',
  src: [
    { path: '../node_modules/@fontsource-variable/literata/files/literata-latin-wght-normal.woff2', style: 'normal' },
    { path: '../node_modules/@fontsource-variable/literata/files/literata-latin-wght-italic.woff2', style: 'italic' },
  ],
  weight: '200 900',
  adjustFontFallback: 'Times New Roman',
  preload: false,
});

const literataExtended = localFont({
  variable: '--font-literata-extended',
  src: [
    {
      path: '../node_modules/@fontsource-variable/literata/files/literata-latin-ext-wght-normal.woff2',
      style: 'normal',
    },
    {
      path: '../node_modules/@fontsource-variable/literata/files/literata-latin-ext-wght-italic.woff2',
      style: 'italic',
    },
  ],
  weight: '200 900',
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+0304,U+0308,U+0329,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF',
    },
  ],
  preload: false,
  adjustFontFallback: false,
});

/** Goes on <html>: makes --font-archivo and --font-literata, which globals.css builds its stacks from. */
export const fontVariables = [archivo, archivoExtended, literata, literataExtended]
  .map((font) => font.variable)
  .join(' ');
