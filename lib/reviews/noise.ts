/** How noise grows under a scheme, from the growth factors of its waves. */

/**
 * Size of noise that has equal parts of every wave and starts at 1.
 * @param moduli largest growth factor |g| of each wave, evenly spaced in the phase angle
 * @param steps  step counts
 * @returns log₁₀ of the root mean square at each count; finite where the size itself would overflow
 * @see Parseval's theorem: on a periodic line the mean square of a field is the sum over its waves
 */
export function noiseExponents(moduli: readonly number[], steps: readonly number[]): number[] {
  const logs = moduli.filter((modulus) => modulus > 0).map(Math.log10);
  if (logs.length === 0) return steps.map((count) => (count === 0 ? 0 : -Infinity));
  const largest = Math.max(...logs);
  return steps.map((count) => {
    // Taken out of the sum, so that no term overflows.
    const sum = logs.reduce((total, log) => total + 10 ** (2 * count * (log - largest)), 0);
    return count * largest + Math.log10(sum / moduli.length) / 2;
  });
}
