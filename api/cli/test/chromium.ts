import { existsSync } from 'node:fs';
import { hasApt, installPackages } from '../apt.ts';
import { runsAsRoot } from '../postgres/run-as-server.ts';

export const chromiumPath = '/usr/bin/chromium';

/** Sees to it that Debian's Chromium is there, for the tests in a real browser. */
export const provideChromium = (say: (line: string) => void): void => {
  if (existsSync(chromiumPath)) return;
  if (!runsAsRoot() || !hasApt()) throw new Error(`The tests in a browser need ${chromiumPath} (Debian package "chromium"), and installing it takes root. Install it, or leave them out: npm test -- --project '!e2e'`);
  say('Installing Chromium (apt-get, about a minute) …');
  installPackages(['chromium']);
};
