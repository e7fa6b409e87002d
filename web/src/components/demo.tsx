import { Message } from './message.tsx';

export const demoWords = 'Demonstration data: invented device and date.';

/** Beside one row of a list. */
export function DemoTag() {
  return <span className="demo nowrap">demonstration data<span className="unseen">: invented device and date</span></span>;
}

/** Above a page or a list that shows invented devices. */
export function DemoNote({ some = false }: { some?: boolean }) {
  return <Message kind="note">{some ? `${demoWords} The rows concerned are marked.` : demoWords}</Message>;
}
