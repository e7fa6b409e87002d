/** Works the method rests on: title, where, what for. */
export const literature = [
  { title: 'Randomized linear gate set tomography', place: 'PRX Quantum 2, 030328 (2021)', doi: '10.1103/PRXQuantum.2.030328', use: 'first-order expansion of random circuits and its pseudo-inverse' },
  { title: 'Self-consistent quantum process tomography', place: 'Physical Review A 87, 062119 (2013)', doi: '10.1103/PhysRevA.87.062119', use: 'linearisation about the target' },
  { title: 'Gate set tomography', place: 'Quantum 5, 557 (2021)', doi: '10.22331/q-2021-10-05-557', use: 'counts of parameters and of gauge' },
  { title: 'A simple formula for the average gate fidelity of a quantum dynamical operation', place: 'Physics Letters A 303, 249 (2002)', doi: '10.1016/S0375-9601(02)01272-0', use: 'relation of average and entanglement fidelity' },
  { title: 'The generation of binomial random variates', place: 'Journal of Statistical Computation and Simulation 46, 101 (1993)', doi: '10.1080/00949659308811496', use: 'the binomial sampler' },
  { title: 'Scrambled linear pseudorandom number generators', place: 'ACM Transactions on Mathematical Software 47, 36 (2021)', doi: '10.1145/3460772', use: 'the generator of random numbers' },
  { title: 'Sample quantiles in statistical packages', place: 'The American Statistician 50, 361 (1996)', doi: '10.1080/00031305.1996.10473566', use: 'quantiles of type 7' },
  { title: 'Inference for ranks with applications to mobility across neighbourhoods and academic achievement across countries', place: 'Review of Economic Studies 91, 476 (2024)', doi: '10.1093/restud/rdad006', use: 'rank ranges from simultaneous differences' },
  { title: 'Exact and approximate stepdown methods for multiple hypothesis testing', place: 'Journal of the American Statistical Association 100, 94 (2005)', doi: '10.1198/016214504000000539', use: 'testing again what is still open' },
] as const;
