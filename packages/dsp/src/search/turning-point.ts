/** Halvings after which an interval cannot get narrower between neighbouring numbers. */
const HALVINGS = 60;

/**
 * Where a condition turns, by bisection between a point at which it holds and one at which it does not.
 *
 * @returns the nearest point found at which it holds
 */
export function turningPoint(holds: (x: number) => boolean, holding: number, failing: number): number {
  let [inside, outside] = [holding, failing];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = inside + (outside - inside) / 2;
    if (middle === inside || middle === outside) break;
    if (holds(middle)) inside = middle;
    else outside = middle;
  }
  return inside;
}
