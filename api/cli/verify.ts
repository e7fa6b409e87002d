import { readAddress } from './verify/read-address.ts';
import { readArchive } from './verify/read-archive.ts';
import { Unreadable } from './verify/source.ts';
import { verify } from './verify/verify.ts';

const USAGE = 'npm run --silent verify -- ENTRY.zip|URL';

/** Exit status of a file, an address or a command line that cannot be used. */
const UNREADABLE = 2;

async function main(): Promise<number> {
  const [target, more] = process.argv.slice(2);
  if (target === undefined || more !== undefined || target.startsWith('-')) throw new Unreadable(`Name one archive or one address. ${USAGE}`);
  const source = /^[a-z][a-z0-9+.-]*:\/\//i.test(target) ? await readAddress(target) : readArchive(target);
  return verify(source, (line) => void process.stdout.write(`${line}\n`));
}

try {
  process.exitCode = await main();
} catch (error) {
  if (!(error instanceof Unreadable)) throw error;
  process.stderr.write(`${error.message}\n`);
  process.exitCode = UNREADABLE;
}
