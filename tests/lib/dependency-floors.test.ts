import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';

/** The lowest versions without a known hole (advisories as collected on 1 December 2026), and those pinned for Node 20. */
const floors: Record<string, string> = {
  next: '16.4.6',
  react: '19.3.1',
  'react-dom': '19.3.1',
  'next-auth': '4.24.15',
  'drizzle-orm': '0.45.2',
  sharp: '0.35.5',
  linkifyjs: '4.3.2',
};

const lock: { packages: Record<string, { version?: string; resolved?: string; hasInstallScript?: boolean }> } =
  JSON.parse(readFileSync('package-lock.json', 'utf8'));
const manifest: { dependencies: Record<string, string>; devDependencies: Record<string, string> } = JSON.parse(
  readFileSync('package.json', 'utf8'),
);

const parts = (version: string) => version.split('-')[0]?.split('.').map(Number) ?? [];

function isAtLeast(version: string, floor: string): boolean {
  const [found, wanted] = [parts(version), parts(floor)];
  for (let i = 0; i < 3; i++) if (found[i] !== wanted[i]) return (found[i] ?? 0) > (wanted[i] ?? 0);
  return true;
}

test.each(Object.entries(floors))('every installed %s is at least %s', (name, floor) => {
  const installed = Object.entries(lock.packages).filter(([path]) => path.endsWith(`node_modules/${name}`));
  for (const [path, { version = '0' }] of installed) expect(isAtLeast(version, floor), `${path} ${version}`).toBe(true);
});

test('every dependency is pinned to one exact version', () => {
  for (const [name, version] of Object.entries({ ...manifest.dependencies, ...manifest.devDependencies })) {
    expect(version, name).toMatch(/^\d+\.\d+\.\d+(-[\w.]+)?$/);
  }
});

test('nothing is fetched from outside the package registry', () => {
  for (const [path, { resolved }] of Object.entries(lock.packages)) {
    if (resolved) expect(resolved, path).not.toMatch(/^(git|http:)|github|codeload/);
  }
});
