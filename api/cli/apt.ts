import { spawnSync } from 'node:child_process';
import { inheritedEnvironment } from '#api/config/config.ts';

export const hasApt = (): boolean => spawnSync('apt-get', ['--version'], { stdio: 'ignore' }).status === 0;

const apt = (args: string[]): void => {
  const { status, stdout, stderr } = spawnSync('apt-get', args, { encoding: 'utf8', stdio: ['ignore', 'pipe', 'pipe'], env: { ...inheritedEnvironment(), DEBIAN_FRONTEND: 'noninteractive' }, maxBuffer: 64 * 1024 * 1024 });
  if (status !== 0) throw new Error(`apt-get ${args.join(' ')} failed:\n${`${stdout}${stderr}`.trim().split('\n').slice(-8).join('\n')}`);
};

/** Installs Debian packages, without recommendations and without questions. Root only. */
export const installPackages = (names: string[]): void => {
  apt(['update', '--quiet']);
  apt(['install', '--yes', '--quiet', '--no-install-recommends', ...names]);
};
