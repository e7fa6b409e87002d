import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { runsAsRoot } from './run-as-server.ts';

/**
 * The folder itself, made if missing; or, where the server's user may not pass through to it (a checkout in
 * root's home), a stand-in under /var/tmp whose name follows from it, so that the next start finds it again.
 */
export const reachableFolder = (wanted: string): string => {
  mkdirSync(wanted, { recursive: true, mode: 0o755 });
  if (!runsAsRoot()) return wanted;
  try {
    execFileSync('runuser', ['-u', 'postgres', '--', 'test', '-x', wanted], { cwd: '/', stdio: 'ignore' });
    return wanted;
  } catch {
    const name = createHash('sha256').update(wanted).digest('hex').slice(0, 12);
    const other = join('/var/tmp', `evenbeam-${name}`);
    mkdirSync(other, { recursive: true, mode: 0o755 });
    return other;
  }
};
