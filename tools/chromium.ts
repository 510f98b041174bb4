import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const candidates = [
  process.env['CHROMIUM_PATH'],
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
];

/** Path of a Chromium; installs Debian's package when there is none and this is a root shell. */
export function findChromium(): string {
  const found = () => candidates.find((path): path is string => path !== undefined && existsSync(path));
  const present = found();
  if (present) return present;
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get'))
    throw new Error('The browser tests need Chromium: install it, or set CHROMIUM_PATH.');
  const apt = (...args: string[]) =>
    execFileSync('apt-get', args, {
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
  apt('update');
  apt('install', '-y', '--no-install-recommends', 'chromium');
  const installed = found();
  if (!installed)
    throw new Error('Chromium was installed but is not where it was expected; set CHROMIUM_PATH.');
  return installed;
}
