// Plain JavaScript that needs nothing but Node: gets the packages if they are missing, then hands over to
// api/cli/start.ts or api/cli/test.ts.
import { spawn } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
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

let running = null;
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => (running ? running.kill(signal) : process.exit(1)));
}

/** Runs a program to its end; gives its exit code. A stop meanwhile is passed on to it. */
const run = (program, args, options) =>
  new Promise((resolve) => {
    running = spawn(program, args, { cwd: root, ...options });
    running.once('error', (fault) => stopWith(`${program} could not be run: ${fault.message}.`));
    running.once('exit', (code, signal) => {
      running = null;
      resolve(signal ? 1 : (code ?? 1));
    });
  });

const read = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')).packages : {});

/** Are the packages of the lock file there, each in its version? npm keeps a list of what it has put in place. */
const isInstalled = () => {
  const present = read(join(root, 'node_modules', '.package-lock.json'));
  return Object.entries(read(join(root, 'package-lock.json'))).every(([path, { version, optional }]) => path === '' || (present[path] ? present[path].version === version : optional === true));
};

if (!isInstalled()) {
  process.stdout.write('Installing packages (npm ci, about a minute) …\n');
  const code = await run('npm', ['ci', '--no-progress', '--loglevel=error'], { stdio: ['ignore', 'inherit', 'inherit'] });
  if (code !== 0) stopWith('npm ci failed or was broken off. The reason, if there is one, stands above; it needs a connection to a package registry.');
}

// The channel lets the other side notice when this process is gone, however it went.
process.exit(await run(process.execPath, ['--disable-warning=DeprecationWarning', '--import', 'tsx', commands[command], ...rest], { stdio: ['inherit', 'inherit', 'inherit', 'ipc'] }));
