// Finds the browser the browser tests drive.
import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { Stop } from './processes.mjs';
import { canInstall, installPackages } from './system-packages.mjs';

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome.exe'];
const usual = [
  '/usr/bin/chromium',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

/** @returns {string | null} */
export function findChromium() {
  const given = process.env.CHROMIUM_PATH;
  if (given) return existsSync(given) ? given : null;
  const onPath = (process.env.PATH ?? '')
    .split(delimiter)
    .filter(Boolean)
    .flatMap((folder) => names.map((name) => join(folder, name)));
  return [...usual, ...onPath].find((file) => existsSync(file)) ?? null;
}

/** The browser, installed through apt where this runs as root on Debian. */
export async function ensureChromium() {
  const found = findChromium();
  if (found) return found;
  if (process.env.CHROMIUM_PATH) throw new Stop(`CHROMIUM_PATH names no file: ${process.env.CHROMIUM_PATH}`);
  if (canInstall()) {
    console.log('Installing chromium for the browser tests.');
    await installPackages(['chromium']);
  }
  const installed = findChromium();
  if (installed) return installed;
  throw new Stop(
    'The browser tests need Chromium or Chrome. Debian: sudo apt-get install chromium. macOS: brew install --cask ' +
      'chromium. Elsewhere set CHROMIUM_PATH to the program.',
  );
}
