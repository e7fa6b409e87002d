import { leafHash, type Hash } from '#shared/merkle/hash.ts';
import { consistencySpans, hashOfSpan, inclusionSpans, nodesAdded, type ReadNode } from '#shared/merkle/tree.ts';

/** A tree grown leaf by leaf, as the registry grows its log: every full subtree is kept, nothing is computed twice. */
export class GrownTree {
  private readonly nodes = new Map<string, Hash>();
  size = 0;

  private readonly read: ReadNode = ({ level, index }) => {
    const hash = this.nodes.get(`${level}/${index}`);
    if (!hash) throw new Error(`node ${level}/${index} was never stored`);
    return hash;
  };

  add(data: Uint8Array): void {
    for (const { level, index, hash } of nodesAdded(this.size, leafHash(data), this.read)) this.nodes.set(`${level}/${index}`, hash);
    this.size += 1;
  }

  rootAt(size: number): Hash {
    return hashOfSpan({ from: 0, to: size }, this.read);
  }

  inclusion(index: number, size: number): Hash[] {
    return inclusionSpans(index, size).map((span) => hashOfSpan(span, this.read));
  }

  consistency(first: number, second: number): Hash[] {
    return consistencySpans(first, second).map((span) => hashOfSpan(span, this.read));
  }
}
