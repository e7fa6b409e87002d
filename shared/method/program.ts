/**
 * A set of circuits arranged so that common work is done once. Gates are gathered into words of up to `wordLength`
 * gates whose products are formed first; circuits that begin with the same words share their states (a tree); the last
 * word is applied to the effects instead. Nodes are numbered by depth and word, so that one word meets many states in a row.
 */
export interface Program {
  wordLength: number;
  /** Word w is gate lastGate[w] after word prefix[w]; prefix −1 = the gate alone. The first K words are the gates. */
  prefix: Int32Array;
  lastGate: Int32Array;
  nodes: number;
  parent: Int32Array;
  /** Runs of nodes from … to that apply the same word, ordered so that parents come first. */
  runs: { word: number; from: number; to: number }[];
  /** Words that end a circuit. */
  endings: Int32Array;
  /** For each circuit the node before its last word, and the place of that word in `endings`; −1 for the empty circuit. */
  endNode: Int32Array;
  ending: Int32Array;
}

/** Longest words tried: 3⁴ products of one-qubit gates still pay for long circuits, longer ones never did. */
const LONGEST_WORD = 4;

/** The cheapest arrangement of the circuits over `gates` gates, for D = 4ⁿ and d − 1 outcomes. */
export function compileCircuits(circuits: readonly Int32Array[], gates: number, D: number, outcomes: number): Program {
  let best: Program | null = null;
  let bestCost = Infinity;
  for (let length = 1; length <= LONGEST_WORD; length++) {
    const program = arrange(circuits, gates, length);
    const cost = (program.prefix.length - gates) * D + program.nodes + program.endings.length * outcomes;
    if (cost < bestCost) {
      best = program;
      bestCost = cost;
    }
  }
  return best!;
}

interface Node {
  word: number;
  parent: Node | null;
  depth: number;
  number: number;
  children: Map<number, Node>;
}

function arrange(circuits: readonly Int32Array[], gates: number, wordLength: number): Program {
  const prefix = Array.from({ length: gates }, () => -1);
  const lastGate = Array.from({ length: gates }, (_, k) => k);
  const longer = new Map<number, number>();
  const wordOf = (c: Int32Array, from: number, to: number): number => {
    let word = c[from]!;
    for (let j = from + 1; j < to; j++) {
      const key = word * gates + c[j]!;
      let next = longer.get(key);
      if (next === undefined) {
        next = prefix.push(word) - 1;
        lastGate.push(c[j]!);
        longer.set(key, next);
      }
      word = next;
    }
    return word;
  };
  const root: Node = { word: -1, parent: null, depth: 0, number: 0, children: new Map() };
  const all: Node[] = [];
  const endings = new Map<number, number>();
  const ends: Node[] = [];
  const ending = new Int32Array(circuits.length);
  circuits.forEach((c, index) => {
    let node = root;
    ending[index] = -1;
    const odd = c.length % wordLength;
    let at = 0;
    while (at < c.length) {
      const to = at === 0 && odd > 0 ? odd : at + wordLength;
      const word = wordOf(c, at, to);
      at = to;
      if (at === c.length) {
        if (!endings.has(word)) endings.set(word, endings.size);
        ending[index] = endings.get(word)!;
        break;
      }
      let child = node.children.get(word);
      if (!child) {
        child = { word, parent: node, depth: node.depth + 1, number: 0, children: new Map() };
        node.children.set(word, child);
        all.push(child);
      }
      node = child;
    }
    ends.push(node);
  });
  all.sort((a, b) => a.depth - b.depth || a.word - b.word);
  const parent = new Int32Array(all.length + 1);
  const runs: Program['runs'] = [];
  all.forEach((node, i) => {
    node.number = i + 1;
    const run = runs[runs.length - 1];
    if (run && run.word === node.word && all[i - 1]!.depth === node.depth) run.to = i + 2;
    else runs.push({ word: node.word, from: i + 1, to: i + 2 });
  });
  for (const node of all) parent[node.number] = node.parent!.number;
  return {
    wordLength, prefix: Int32Array.from(prefix), lastGate: Int32Array.from(lastGate), nodes: all.length + 1, parent, runs,
    endings: Int32Array.from(endings.keys()), endNode: Int32Array.from(ends, (n) => n.number), ending,
  };
}
