import { closeSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';

/** Does this process id belong to a launcher that is alive? Ids are used again, so its command line is looked at. */
const isLauncher = (pid: number): boolean => {
  if (!Number.isInteger(pid) || pid <= 0) return false;
  try {
    process.kill(pid, 0);
  } catch (fault) {
    if ((fault as NodeJS.ErrnoException).code === 'ESRCH') return false;
  }
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('api/cli/start.ts');
  } catch {
    return true;
  }
};

/** One launcher a folder. Returns the release; throws a sentence if another one is at work. */
export const takeLock = (file: string): (() => void) => {
  for (let attempt = 0; attempt < 2; attempt += 1) {
    try {
      const handle = openSync(file, 'wx');
      writeSync(handle, String(process.pid));
      closeSync(handle);
      return () => rmSync(file, { force: true });
    } catch (fault) {
      if ((fault as NodeJS.ErrnoException).code !== 'EEXIST') throw fault;
      const pid = Number(readFileSync(file, 'utf8'));
      if (isLauncher(pid)) throw new Error(`The registry is already started from this folder (process ${pid}). Stop that one first, with Ctrl-C where it runs or \`kill ${pid}\`.`);
      // Left by a launcher that was killed.
      rmSync(file, { force: true });
    }
  }
  throw new Error(`Another start is at work in this folder (${file}).`);
};
