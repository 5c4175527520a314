import { join } from 'node:path';
import { Font, StyleSheet } from '@react-pdf/renderer';

/**
 * The house's type for paper. Each file holds the letters of one script, so a text names them all and takes every letter from
 * the first that has it. Read from the packages themselves: the app runs from its own folder.
 * @type {Record<string, [family: string, script: string]>}
 */
const families = {
  Archivo: ['archivo', 'latin'],
  'Archivo Ext': ['archivo', 'latin-ext'],
  'Archivo Viet': ['archivo', 'vietnamese'],
  'Literata Greek': ['literata', 'greek'],
  'Literata Cyrillic': ['literata', 'cyrillic'],
};

for (const [name, [family, script]] of Object.entries(families)) {
  const folder = join(process.cwd(), `node_modules/@fontsource/${family}/files`);
  const fonts = [400, 600].map((fontWeight) => ({
    src: join(folder, `${family}-${script}-${fontWeight}-normal.woff`),
    fontWeight,
  }));
  Font.register({ family: name, fonts });
}

const LONGEST_UNBROKEN = 24;

// A hyphen that nobody wrote would change what was signed: only what would run over the edge is broken.
Font.registerHyphenationCallback((word) =>
  word.length <= LONGEST_UNBROKEN ? [word] : (word.match(/.{1,12}/gsu) ?? [word]),
);

const ink = '#15252b';
const soft = '#4c5d63';
const line = '#c5d0d2';
const late = '#a8451c';

/** Sizes in points on A4, colours of the light theme. */
export const paper = StyleSheet.create({
  page: {
    paddingTop: 42,
    paddingBottom: 54,
    paddingHorizontal: 42,
    fontFamily: Object.keys(families),
    fontSize: 9.5,
    color: ink,
  },
  over: { fontSize: 9, color: soft, marginBottom: 4 },
  title: { fontSize: 22, fontWeight: 600, marginBottom: 4 },
  instrument: { fontSize: 13, fontWeight: 600 },
  fact: { fontSize: 10, color: soft, marginTop: 2 },
  board: { marginTop: 16 },
  section: { marginTop: 20, paddingTop: 6, borderTopWidth: 1.5, borderTopColor: ink, fontSize: 13, fontWeight: 600 },
  head: {
    flexDirection: 'row',
    borderBottomWidth: 1,
    borderBottomColor: ink,
    paddingVertical: 3,
    color: soft,
    fontSize: 8,
  },
  row: { flexDirection: 'row', borderBottomWidth: 0.5, borderBottomColor: line, paddingVertical: 5 },
  item: { width: 124, paddingRight: 8 },
  signed: { width: 96, paddingRight: 8 },
  built: { width: 104, paddingRight: 8 },
  proof: { width: 109, paddingRight: 8 },
  thumb: { width: 78, height: 52, objectFit: 'cover' },
  strong: { fontWeight: 600 },
  note: { fontSize: 8, color: soft, marginTop: 1 },
  late: { fontSize: 8, color: late, marginTop: 1, fontWeight: 600 },
  paragraph: { marginTop: 6, lineHeight: 1.45 },
  grid: { flexDirection: 'row', flexWrap: 'wrap', marginTop: 8 },
  print: { width: 164, marginRight: 6, marginBottom: 6 },
  picture: { width: 164, height: 112, objectFit: 'cover' },
  caption: { fontSize: 7.5, color: soft, marginTop: 2, maxLines: 1 },
  alt: { fontSize: 7.5, color: soft, maxLines: 1, textOverflow: 'ellipsis' },
  foot: {
    position: 'absolute',
    bottom: 24,
    left: 42,
    right: 42,
    flexDirection: 'row',
    justifyContent: 'space-between',
    fontSize: 8,
    color: soft,
  },
});

export const boardColours = { wood: '#2a1512', nut: '#efe6cf', fret: '#c9ced0' };
