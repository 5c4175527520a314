import { readFileSync } from 'node:fs';
import { join } from 'node:path';

function cells(line: string): string[] {
  const out: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i++) {
    const char = line.charAt(i);
    if (quoted && char === '"' && line.charAt(i + 1) === '"') {
      cell += '"';
      i++;
    } else if (char === '"') quoted = !quoted;
    else if (char === ',' && !quoted) {
      out.push(cell);
      cell = '';
    } else cell += char;
  }
  return [...out, cell];
}

/** One published table of tests/reference as rows keyed by its header; quoted cells may hold commas, not line breaks. */
export function readReference(name: string): Record<string, string>[] {
  const [header = '', ...lines] = readFileSync(join(import.meta.dirname, '../reference', `${name}.csv`), 'utf8')
    .split(/\r?\n/)
    .filter((line) => line !== '');
  const keys = cells(header);
  return lines.map((line) => Object.fromEntries(cells(line).map((cell, i) => [keys[i] ?? '', cell])));
}
