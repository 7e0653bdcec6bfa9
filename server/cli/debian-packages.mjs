import { spawnSync } from 'node:child_process';

const works = (command, words) => spawnSync(command, words, { stdio: 'ignore' }).status === 0;

export const isInstalled = (command) => works('sh', ['-c', 'command -v "$0"', command]);

/** Installs Debian packages where this process may; false: it may not, or it did not work. */
export function installDebianPackages(packages) {
  const mayInstall = process.getuid?.() === 0 && isInstalled('apt-get');
  if (!mayInstall) return false;
  console.log(`Installing from Debian: ${packages.join(' ')}`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const aptGet = (...words) => spawnSync('apt-get', words, { stdio: ['ignore', 'ignore', 'inherit'], env });
  aptGet('update', '-q');
  return aptGet('install', '-y', '-q', '--no-install-recommends', ...packages).status === 0;
}
