// Entry of a thread when running from source: TypeScript is made ready first, inside the thread itself.
import { register } from 'tsx/esm/api';

register();
const { default: work } = await import('./thread.ts');
export default work;
