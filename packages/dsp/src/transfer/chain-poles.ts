import { stagesOf, type StageChain } from './frequency-response.js';
import type { Root } from './polynomial-roots.js';
import { poles } from './transfer-function.js';

/** Poles of two stages nearer than this share of their distance from the origin are one of higher multiplicity. */
const SAME = 1e-9;

/**
 * Poles of stages in series, equal ones of several stages united. They come from each stage by itself, since close poles of
 * several stages are known far better there than from the product of the denominators.
 */
export function chainPoles(chain: StageChain): Root[] {
  return uniteRoots(stagesOf(chain).flatMap(poles));
}

/** The roots with equal ones united. */
export function uniteRoots(roots: readonly Root[]): Root[] {
  const out: Root[] = [];
  for (const root of roots) {
    const reach = SAME * Math.hypot(root.re, root.im);
    const same = out.find((other) => Math.hypot(other.re - root.re, other.im - root.im) <= reach);
    if (same) same.multiplicity += root.multiplicity;
    else out.push({ ...root });
  }
  return out;
}
