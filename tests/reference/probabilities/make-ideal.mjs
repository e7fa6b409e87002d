/**
 * Ideal outcome probabilities of random circuits over the OpenQASM standard gates, by the npm package quantum-circuit:
 *   node make-ideal.mjs > ideal.json
 * Outcomes ascend as bit strings, leftmost character = first qubit. Its wires count from the least significant bit of
 * its state index being the first wire; the script reorders them.
 */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const QuantumCircuit = require('quantum-circuit');
const version = JSON.parse(readFileSync(require.resolve('quantum-circuit/package.json'), 'utf8')).version;
const seed = 'ideal probabilities 1';
let counter = 0;
/** Uniform in [0, 1) from SHA-256 of seed and counter: slow, plain, the same everywhere. */
const uniform = () => createHash('sha256').update(`${seed}:${counter++}`).digest().readUInt32LE(0) / 2 ** 32;
const pick = (list) => list[Math.floor(uniform() * list.length)];

const plain = ['id', 'x', 'y', 'z', 'h', 's', 'sdg', 't', 'tdg', 'sx'];
const turning = ['p', 'rx', 'ry', 'rz'];
const pairs = ['cx', 'cy', 'cz', 'ch', 'swap'];
const theirs = { sx: 'srn', p: 'u1' };
const angleNames = { rx: 'theta', ry: 'theta', rz: 'phi', u1: 'lambda' };

function probabilities(qubits, gates) {
  const circuit = new QuantumCircuit(qubits);
  gates.forEach(({ gate, params, targets }, column) => {
    const name = theirs[gate] ?? gate;
    circuit.addGate(name, column, targets, params ? { params: { [angleNames[name]]: params[0] } } : undefined);
  });
  circuit.run();
  const out = new Array(2 ** qubits).fill(0);
  for (const { indexBinStr, amplitude } of circuit.stateAsArray(true)) {
    const firstLeft = [...indexBinStr].reverse().join('');
    out[parseInt(firstLeft, 2)] += amplitude.re ** 2 + amplitude.im ** 2;
  }
  return out;
}

const circuits = [];
for (const qubits of [1, 2, 3]) {
  for (let i = 0; i < 24; i += 1) {
    const gates = Array.from({ length: 3 + Math.floor(uniform() * 12) }, () => {
      if (qubits > 1 && uniform() < 0.35) {
        const first = Math.floor(uniform() * qubits);
        return { gate: pick(pairs), targets: [first, (first + 1 + Math.floor(uniform() * (qubits - 1))) % qubits] };
      }
      const targets = [Math.floor(uniform() * qubits)];
      return uniform() < 0.5 ? { gate: pick(plain), targets } : { gate: pick(turning), params: [Math.round((2 * uniform() - 1) * 3000) / 1000], targets };
    });
    circuits.push({ qubits, gates, probabilities: probabilities(qubits, gates) });
  }
}
process.stdout.write(`${JSON.stringify({ header: { script: 'make-ideal.mjs', tool: `quantum-circuit ${version}`, node: process.version, seed }, circuits })}\n`);
