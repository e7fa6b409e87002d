// Entry of a worker thread when running from TypeScript sources: tsx puts its loader only into the main thread by itself.
import { register } from 'tsx/esm/api';

register();
const { default: run } = await import('./thread.ts');

export default run;
