import { existsSync } from 'node:fs';
import { run } from './processes.mjs';

export const canInstall = () => process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');

/** Installs Debian packages; only where this runs as root on Debian. @param {string[]} names */
export async function installPackages(names) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const update = await run('apt-get', ['-qq', 'update'], { env, quiet: true });
  const install = await run('apt-get', ['-qq', 'install', '-y', '--no-install-recommends', ...names], {
    env,
    quiet: true,
  });
  if (install.code !== 0) process.stderr.write(update.output + install.output);
  return install.code === 0;
}
