import type { Dataset } from '#shared/formats/types.ts';
import { chained, customPair, oneQubit } from './samples.ts';

type Path = (string | number)[];

/** A copy of a sample with one place set, or removed where the value is undefined. */
function put(sample: Dataset, path: Path, value: unknown): unknown {
  const copy = structuredClone(sample) as unknown as Record<string | number, unknown>;
  let node = copy;
  for (const step of path.slice(0, -1)) node = node[step] as Record<string | number, unknown>;
  const last = path.at(-1) ?? '';
  if (value === undefined) delete node[last];
  else node[last] = value;
  return copy;
}

const one = (path: Path, value: unknown): unknown => put(oneQubit(), path, value);
const pair = (path: Path, value: unknown): unknown => put(customPair(), path, value);
const chain = (path: Path, value: unknown): unknown => put(chained(), path, value);
const circuit = ['patches', 0, 'circuits', 0];

export type Broken = [name: string, file: unknown, pointer: string, words: string];

/** Faults that the schema finds. */
export const againstSchema: Broken[] = [
  ['not an object', [], '', 'must be an object'],
  ['another format', one(['format'], 'evenbeam.circuits'), '/format', 'must be "evenbeam.dataset"; it is "evenbeam.circuits"'],
  ['another version', one(['formatVersion'], '2.0.0'), '/formatVersion', '"1.0.0"'],
  ['title missing', one(['title'], undefined), '', '"title" is missing'],
  ['title empty', one(['title'], ''), '/title', 'at least 1 character'],
  ['title with a line break', one(['title'], 'two\nlines'), '/title', 'one line of text'],
  ['title that turns the reading direction', one(['title'], 'left \u202e right'), '/title', '\\u202e'],
  ['unknown property', one(['colour'], 'red'), '/colour', 'no property "colour"'],
  ['unknown property deep inside', one([...circuit, 'seed'], 1), '/patches/0/circuits/0/seed', 'no property "seed"'],
  ['unknown modality', one(['device', 'modality'], 'abacus'), '/device/modality', 'trapped-ion'],
  ['gate class with a capital', one(['gateClass'], 'Quarter/1'), '/gateClass', 'id of a gate class'],
  ['run sheet without digest', one(['runSheet'], { id: 'RS-000123' }), '/runSheet', '"sha256" is missing'],
  ['run sheet with a digest in capitals', one(['runSheet'], { id: 'RS-000123', sha256: 'A'.repeat(64) }), '/runSheet/sha256', '64 hexadecimal digits'],
  ['empty register', one(['register'], []), '/register', 'at least 1 item'],
  ['a qubit named twice', pair(['register'], ['q', 'q']), '/register/1', 'same item twice'],
  ['a target that is no whole number', one(['gates', 0, 'targets'], [0.5]), '/gates/0/targets/0', 'whole number; it is 0.5'],
  ['a gate with the same target twice', pair(['gates', 2, 'targets'], [1, 1]), '/gates/2/targets/1', 'same item twice'],
  ['a gate on three targets', chain(['gates', 9, 'targets'], [0, 1, 2]), '/gates/9/targets', 'at most 2 items'],
  ['a gate of no standard', one(['gates', 0, 'ideal', 'gate'], 'wobble'), '/gates/0/ideal/gate', 'it is "wobble"'],
  ['a gate with name and matrix', pair(['gates', 0, 'ideal', 'gate'], 'x'), '/gates/0/ideal/gate', 'no property "gate"'],
  ['an angle as text', one(['gates', 0, 'ideal', 'params'], ['pi/2']), '/gates/0/ideal/params/0', 'a number; it is "pi/2"'],
  ['no patch', one(['patches'], []), '/patches', 'at least 1 item'],
  ['a patch without circuits', one(['patches', 0, 'circuits'], []), '/patches/0/circuits', 'at least 1 item'],
  ['zero shots', one([...circuit, 'shots'], 0), '/patches/0/circuits/0/shots', 'at least 1; it is 0'],
  ['a negative count', one([...circuit, 'counts'], { 0: -1, 1: 1001 }), '/patches/0/circuits/0/counts/0', 'at least 0; it is -1'],
  ['half a count', one([...circuit, 'counts', '0'], 0.5), '/patches/0/circuits/0/counts/0', 'whole number'],
  ['a count as text', one([...circuit, 'counts', '0'], '31'), '/patches/0/circuits/0/counts/0', 'it is "31"'],
  ['an outcome that is no bit string', one([...circuit, 'counts'], { up: 1000 }), '/patches/0/circuits/0/counts/up', '"up" cannot be an outcome'],
  ['gates as one text', one([...circuit, 'gates'], 'aib'), '/patches/0/circuits/0/gates', 'a list; it is "aib"'],
  ['a circuit that is null', one(circuit, null), '/patches/0/circuits/0', 'an object; it is null'],
  ['block as text', one([...circuit, 'block'], 'one'), '/patches/0/circuits/0/block', 'whole number'],
  ['time without offset', one(['acquisition', 'startedAt'], '2026-05-04T08:00:00'), '/acquisition/startedAt', 'offset from UTC'],
  ['no contributor', one(['contributors'], []), '/contributors', 'at least 1 item'],
  ['ORCID iD of another form', one(['contributors', 0, 'orcid'], '0000000218250097'), '/contributors/0/orcid', 'ORCID iD'],
  ['licence null', one(['licence'], null), '/licence', 'a text; it is null'],
  ['extra as a list', one(['extra'], []), '/extra', 'an object'],
];

const s = Math.SQRT1_2;

/** Faults that only the rules beyond the schema find. */
export const againstRules: Broken[] = [
  ['30 February', one(['acquisition', 'startedAt'], '2026-02-30T08:00:00Z'), '/acquisition/startedAt', 'no date and time'],
  ['hour 24', one(['acquisition', 'endedAt'], '2026-05-04T24:00:00Z'), '/acquisition/endedAt', 'no date and time'],
  ['end before start, by offset', one(['acquisition', 'endedAt'], '2026-05-04T09:10:00+02:00'), '/acquisition/endedAt', 'before startedAt'],
  ['ORCID iD with a wrong check digit', one(['contributors', 0, 'orcid'], '0000-0002-1825-0098'), '/contributors/0/orcid', 'should be 7'],
  ['licence in other letters', one(['licence'], 'cc-by-4.0'), '/licence', 'written "CC-BY-4.0"'],
  ['licence that does not exist', one(['licence'], 'Public-Domain-ish'), '/licence', 'not an SPDX licence id'],
  ['a label twice', pair(['gates', 1, 'label'], 'p'), '/gates/1/label', 'taken by gate 0'],
  ['a target outside the register', one(['gates', 1, 'targets'], [1]), '/gates/1/targets/0', 'no index of the register'],
  ['a one-qubit gate on two targets', pair(['gates', 1, 'targets'], [0, 1]), '/gates/1/targets', 'acts on 1 qubit, but 2 targets'],
  ['an angle missing', one(['gates', 0, 'ideal'], { gate: 'rx' }), '/gates/0/ideal', 'takes 1 angle, but 0 are given'],
  ['an angle too many', one(['gates', 1, 'ideal'], { gate: 'id', params: [0] }), '/gates/1/ideal/params', 'takes 0 angles, but 1 is given'],
  ['a matrix of the wrong size', pair(['gates', 2, 'ideal'], { unitary: [[[1, 0], [0, 0]], [[0, 0], [1, 0]]] }), '/gates/2/ideal/unitary', '2 rows; for 2 targets it must have 4'],
  ['a ragged matrix', pair(['gates', 0, 'ideal'], { unitary: [[[1, 0], [0, 0]], [[0, 0], [1, 0], [0, 0]]] }), '/gates/0/ideal/unitary/1', 'Row 1 has 3 elements'],
  ['a matrix that is unitary to 2e-9 only', pair(['gates', 0, 'ideal'], { unitary: [[[s, 0], [0, -s]], [[0, -s], [s + 2e-9, 0]]] }), '/gates/0/ideal/unitary', 'not unitary'],
  ['another register than the class', put({ ...customPair(), gateClass: 'quarter-turn-1q/1' }, ['title'], 'x'), '/register', 'for a register of 1; this one has 2'],
  ['a gate of another class', one(['gates', 1, 'ideal'], { gate: 'h' }), '/gates', 'has the gate id on qubit 0'],
  ['a gate 2e-9 away from the class', one(['gates', 0, 'ideal', 'params'], [Math.PI / 2 + 2e-9]), '/gates', 'rx(1.5707963267948966)'],
  ['a gate on another qubit of the class', chain(['gates', 10, 'targets'], [0, 2]), '/gates', 'cz on qubits 1, 2'],
  ['a patch outside the register', one(['patches', 0, 'qubits'], [1]), '/patches/0/qubits/0', 'no index of the register'],
  ['a joint patch that leaves a qubit out', pair(['patches', 0, 'qubits'], [0]), '/patches/0/qubits', 'qubit 1 is missing'],
  ['a joint patch of three', put({ ...chained(), gateClass: 'custom' }, ['patches'], [chained().patches[5]]), '/patches/0/qubits', 'one or two qubits; this has 3'],
  ['two patches of one qubit', chain(['patches', 1, 'qubits'], [0]), '/patches/1/qubits', 'has a one-qubit patch already: patch 0'],
  ['a qubit without its patch', chain(['patches'], chained().patches.filter((_, p) => p !== 2)), '/patches', 'Qubit 2 ("q2") has no one-qubit patch'],
  ['two patches of one pair', chain(['patches', 4, 'qubits'], [1, 0]), '/patches/4/qubits', '0 and 1 have a patch already: patch 3'],
  ['a circuit id twice, in two patches', chain(['patches', 4, 'circuits', 0, 'id'], 'p01'), '/patches/4/circuits/0/id', 'first at /patches/3/circuits/0'],
  ['a gate that is not declared', one([...circuit, 'gates', 1], 'j'), '/patches/0/circuits/0/gates/1', 'No gate is called "j"'],
  ['a gate called like a property that every object has', one([...circuit, 'gates', 1], 'toString'), '/patches/0/circuits/0/gates/1', 'No gate is called "toString"'],
  ['a gate outside the patch', chain(['patches', 3, 'circuits', 0, 'gates', 1], 'z12'), '/patches/3/circuits/0/gates/1', 'acts on qubits 2, 1'],
  ['counts that do not sum to the shots', one([...circuit, 'counts', '1'], 968), '/patches/0/circuits/0/counts', 'sum to 999, but shots is 1000'],
  ['no counts at all', one([...circuit, 'counts'], {}), '/patches/0/circuits/0/counts', 'sum to 0'],
  ['an outcome of the wrong length', pair([...circuit, 'counts'], { '00': 400, 111: 600 }), '/patches/0/circuits/0/counts/111', 'has 3 characters; the patch has 2 qubits'],
  ['a gate that is never used', one([...circuit, 'gates'], ['a', 'b']), '/gates/1', '"i" is not used in any circuit'],
  ['a gate used only where it is not estimated', chain(['patches', 4, 'circuits', 0, 'gates'], ['x1']), '/gates/10', 'patch of qubits 2, 1, which estimates it'],
];
