// Plain JavaScript that needs nothing but Node: gets the packages if they are missing, then hands over to
// api/cli/start.ts or api/cli/test.ts.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, statSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { dirname, join } from 'node:path';

const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));
const [command, ...rest] = process.argv.slice(2);
const commands = { start: 'api/cli/start.ts', test: 'api/cli/test.ts' };

const stopWith = (sentence) => {
  process.stderr.write(`${sentence}\n`);
  process.exit(1);
};

const [major, minor] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 19)) stopWith(`Evenbeam needs Node.js 20.19 or newer; this is ${process.versions.node}.`);
if (!Object.hasOwn(commands, command)) stopWith(`Use: node api/cli/bootstrap.mjs ${Object.keys(commands).join(' | ')}`);

/** npm writes this file last; while it is younger than the lock file, the packages are those of the lock file. */
const installed = join(root, 'node_modules', '.package-lock.json');
const lock = join(root, 'package-lock.json');
if (!existsSync(installed) || statSync(installed).mtimeMs < statSync(lock).mtimeMs) {
  process.stdout.write('Installing packages (npm ci, about a minute) …\n');
  const { status, error } = spawnSync('npm', ['ci', '--no-progress', '--loglevel=error'], { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] });
  if (error) stopWith(`npm could not be run: ${error.message}.`);
  if (status !== 0) stopWith('npm ci failed: the reason stands above. Is there a connection to a package registry?');
}

// The channel lets the other side notice when this process is gone, however it went.
const child = spawn(process.execPath, ['--disable-warning=DeprecationWarning', '--import', 'tsx', commands[command], ...rest], { cwd: root, stdio: ['inherit', 'inherit', 'inherit', 'ipc'] });
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
child.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
