/**
 * Derivative of the Dirichlet kernel Σ cos(φ(n − c)) = sin(Nφ/2)/sin(φ/2) with respect to φ; its negative is
 * Σ (n − c) sin(φ(n − c)), with c the centre of N samples.
 */
export function dirichletSlope(angle: number, sampleCount: number): number {
  const half = angle / 2;
  const sine = Math.sin(half);
  if (Math.abs(sine) < 1e-12) return 0;
  const numerator =
    sampleCount * Math.cos(sampleCount * half) * sine - Math.sin(sampleCount * half) * Math.cos(half);
  return numerator / (2 * sine * sine);
}
