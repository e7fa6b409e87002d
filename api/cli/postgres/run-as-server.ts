import { execFile, type ExecFileException } from 'node:child_process';
import { execFileSync } from 'node:child_process';
import { promisify } from 'node:util';
import { chownSync } from 'node:fs';

const execute = promisify(execFile);

/** PostgreSQL refuses to run as root; root hands its work to the `postgres` user that Debian's package makes. */
export const runsAsRoot = (): boolean => process.getuid?.() === 0;

/** Runs a program as the user that owns the cluster, from `/` (that user may not enter the current folder). */
export const runAsServer = async (program: string, args: string[]): Promise<string> => {
  const [file, list] = runsAsRoot() ? ['runuser', ['-u', 'postgres', '--', program, ...args]] : [program, args];
  try {
    const { stdout } = await execute(file, list, { cwd: '/', maxBuffer: 16 * 1024 * 1024 });
    return stdout;
  } catch (error) {
    const failure = error as ExecFileException & { stderr?: string; stdout?: string };
    throw new Error(`${program} failed: ${(failure.stderr || failure.stdout || failure.message).trim()}`, { cause: error });
  }
};

/** Gives a file or folder to the user that runs the server. */
export const giveToServer = (path: string): void => {
  if (!runsAsRoot()) return;
  const id = (flag: string): number => Number(execFileSync('id', [flag, 'postgres'], { encoding: 'utf8' }));
  chownSync(path, id('-u'), id('-g'));
};
