import { readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';

/** Every door of the product, read from its files: pages, the methods of its route handlers, and its server actions. */
const routeOf = (file: string) =>
  file
    .replace(/^app/, '')
    .replace(/\/(page\.tsx|route\.ts|actions\.ts)$/, '')
    .replace(/\/\([\w-]+\)/g, '') || '/';

const exported = (file: string, pattern: RegExp) =>
  [...readFileSync(file, 'utf8').matchAll(pattern)].map((match) => match[1] ?? '');

const sources = readdirSync('app', { recursive: true, encoding: 'utf8' }).map((path) => join('app', path));
const files = (name: string) => sources.filter((path) => basename(path) === name).sort();

const METHODS = /export (?:const|async function|function) (GET|HEAD|POST|PUT|PATCH|DELETE|OPTIONS)\b/g;
const ACTIONS = /export (?:const|async function) (\w+)/g;

export const pageDoors = files('page.tsx').map((file) => `page ${routeOf(file)}`);
export const routeDoors = files('route.ts').flatMap((file) =>
  exported(file, METHODS).map((method) => `${method} ${routeOf(file)}`),
);
export const actionDoors = files('actions.ts').flatMap((file) =>
  exported(file, ACTIONS).map((name) => `action ${routeOf(file)}#${name}`),
);

export const allDoors = [...pageDoors, ...routeDoors, ...actionDoors];

type Manifest = { node: Record<string, { filename: string; exportedName: string }> };

/** The id under which the built app takes an action's calls. */
export function actionId(door: string): string {
  const manifest: Manifest = JSON.parse(readFileSync('.next/server/server-reference-manifest.json', 'utf8'));
  const found = Object.entries(manifest.node).find(
    ([, { filename, exportedName }]) => `action ${routeOf(filename)}#${exportedName}` === door,
  );
  if (!found) throw new Error(`the built app has no ${door}`);
  return found[0];
}
