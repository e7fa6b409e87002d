import type { Fact } from '#web/components/facts.tsx';

/** What each published figure is, in words and in symbols. */
export const figureDefinitions: readonly Fact[] = [
  { term: 'Retained signal', value: <>How much of the ideal signal is left after L gates, over the class’s bench circuits of that depth: <span className="formula">R<sub>L</sub> = Σ(p − 1/d)(p̂ − 1/d) ∕ Σ(p − 1/d)²</span>, summed over circuits and outcomes, with p ideal, p̂ predicted and d = 2<sup>n</sup>. 1 is an ideal device, 0 is nothing left. The headline is R<sub>16</sub>.</> },
  { term: 'Output error', value: <>Mean total variation distance between the predicted and the ideal outcome probabilities of the bench circuits of one depth.</> },
  { term: 'Error per gate', value: <>From the rate at which an average gate of the set forgets: <span className="formula">r = (1 − λ)(D − 1)/D</span>, where D = 4<sup>n</sup> and λ is the eigenvalue, continued from 1, of the map that applies a noisy gate and undoes the ideal one, averaged over the gates. It may come out below zero within noise and is then shown so.</> },
  { term: 'Gate loss', value: <>Of one gate: <span className="formula">1 − (1/D) Σ<sub>i</sub> Re(μ̄<sub>i</sub> λ<sub>i</sub>)</span>, with λ its eigenvalues and μ the ideal ones, matched so that they lie nearest. To first order it is the entanglement infidelity.</> },
  { term: 'Angle error', value: <>Of a gate that is one rotation: by how much it turns too far (above zero) or too little (below zero), in radians. A gate that turns nothing, such as the identity, has none.</> },
  { term: 'Readout loss', value: <>1 − R<sub>0</sub>, read from the empty circuit: what preparation and readout lose together.</> },
  { term: 'Prediction error', value: <>Mean total variation distance between prediction and counts on the sealed circuits, beside the same for the ideal model and for shot noise alone.</> },
];

/** Literature by title; the expansion, its linear algebra and the counts of parameters. */
export const literature: readonly string[] = [
  '“Randomized linear gate set tomography”, PRX Quantum 2, 030328 (2021): first-order expansion of random circuits, pseudo-inverse.',
  '“Self-consistent quantum process tomography”, Phys. Rev. A 87, 062119 (2013): linearisation about the target.',
  '“Gate set tomography”, Quantum 5, 557 (2021): counts of parameters and of gauge.',
  '“A simple formula for the average gate fidelity of a quantum dynamical operation”, Phys. Lett. A 303, 249 (2002).',
];
