import { Message } from './message.tsx';

/** Printed wherever figures may drive a purchase. */
export function Caution({ children }: { children?: string }) {
  return <Message kind="caution">{children ?? 'Figures hold for the qubits, gates and dates of each entry. They do not replace acceptance testing under a contract.'}</Message>;
}
