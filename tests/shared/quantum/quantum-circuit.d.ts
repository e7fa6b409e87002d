declare module 'quantum-circuit' {
  export default class QuantumCircuit {
    constructor(qubits: number);
    addGate(name: string, column: number, wires: number | number[], options?: { params: Record<string, number> }): void;
    run(): void;
    /** With false every basis state is listed, with true only those of non-zero amplitude. */
    stateAsArray(onlyPossible: boolean): { amplitude: { re: number; im: number } }[];
  }
}
