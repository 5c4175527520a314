import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const PLACES = [
  process.env.CHROMIUM_PATH ?? '',
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/usr/bin/google-chrome-stable',
  '/opt/google/chrome/chrome',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

const find = () => PLACES.find((path) => path !== '' && existsSync(path));

/**
 * A Chromium or Chrome on this machine; on Debian as root it is installed when there is none.
 * @returns {string} its path
 */
export function requireBrowser() {
  const known = find();
  if (known) return known;
  if (process.getuid?.() === 0 && existsSync('/etc/debian_version')) {
    console.log('Installing Chromium for the browser tests.');
    spawnSync('apt-get', ['update', '-qq'], { stdio: 'inherit' });
    spawnSync('apt-get', ['install', '-y', '-qq', 'chromium'], { stdio: ['ignore', 'ignore', 'inherit'] });
  }
  const installed = find();
  if (installed) return installed;
  throw new Error(
    'There is no Chromium or Chrome here. Install one, or set CHROMIUM_PATH to it, and run npm test again.',
  );
}
