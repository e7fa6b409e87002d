import type { LogHead } from '#shared/contracts/log.ts';
import { formatTime } from '#shared/domain/format-date.ts';
import { formatCount } from '#shared/domain/format.ts';
import { Ledger } from '#web/components/facts.tsx';

/** The newest signed head, whole: what a reader keeps to hold the registry to it. */
export function HeadLedger({ head }: { head: LogHead }) {
  return (
    <Ledger items={[
      { term: 'Leaves', value: formatCount(head.treeSize) },
      { term: 'Signed', value: formatTime(head.at) },
      { term: 'Root hash', value: <span className="hash">{head.rootHash}</span> },
      { term: 'Signature', value: <><span className="hash">{head.signature}</span>; Ed25519 over the RFC 8785 bytes of treeSize, rootHash and at</> },
      { term: 'Public key', value: <><span className="hash">{head.publicKey}</span>; SPKI, base64</> },
      { term: 'Key', value: <><span className="hash">{head.keyId}</span>; SHA-256 of the public key</> },
    ]} />
  );
}
