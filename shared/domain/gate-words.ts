import type { IdealGate } from '#shared/formats/types.ts';

/** An angle as people write it: 1.5707963267948966 -> "π/2", -0.3 -> "−0.3 rad". */
export const angleInWords = (angle: number): string => {
  const sign = angle < 0 ? '\u2212' : '';
  for (const below of [1, 2, 3, 4, 6, 8, 16]) {
    const above = Math.abs(angle) / (Math.PI / below);
    const whole = Math.round(above);
    if (whole === 0 || Math.abs(above - whole) > 1e-9) continue;
    return `${sign}${whole === 1 ? '' : whole}π${below === 1 ? '' : `/${below}`}`;
  }
  return angle === 0 ? '0' : `${sign}${Number(Math.abs(angle).toPrecision(6))} rad`;
};

/** An ideal gate in words: "identity", "rx(π/2)", "cz", "a unitary of its own". */
export const gateInWords = (ideal: IdealGate): string => {
  if (!('gate' in ideal)) return 'a unitary of its own';
  if (ideal.gate === 'id') return 'identity';
  return ideal.params?.length ? `${ideal.gate}(${ideal.params.map(angleInWords).join(', ')})` : ideal.gate;
};
