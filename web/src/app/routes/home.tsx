import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';

export function Component() {
  return <Wrap><PageHead title="Gate quality, measured one way and printed with its doubt" /></Wrap>;
}
